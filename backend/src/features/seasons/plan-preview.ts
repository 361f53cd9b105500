import type { AppContext } from '#backend/app-context.ts';
import type { Read } from '#backend/database/transaction.ts';
import { readShore } from '#backend/features/shores/shores.reader.ts';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import { readShoreTide } from '#backend/features/tides/tides.reader.ts';
import type { ShoreTide } from '#backend/features/tides/tides.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import type { FieldProblem } from '#backend/http/problem.ts';
import { nextDates, patternOf, patternSentence } from '#shared/domain/seasons/recurrence.ts';
import type { Pattern } from '#shared/domain/seasons/recurrence.ts';
import { planDates } from '#shared/domain/seasons/season-plan.ts';
import type { PlanDate, PlanRefusal, SeasonPlan } from '#shared/domain/seasons/season-plan.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { sayPatternRefusal } from './say-pattern-refusal.ts';
import { windowRulesOf } from './seasons.reader.ts';
import type { PlanValues } from './seasons.reader.ts';

const datesReadBack = 5;

/** Every date of a plan with what decided it. */
export interface PlanPreview {
  readonly sentence: string;
  readonly nextDates: readonly CalendarDay[];
  readonly shore: Shore;
  readonly tide: ShoreTide;
  readonly dates: readonly PlanDate[];
}

/** The dates of a plan as they stand today. Refused beside the field that cannot be used. */
export async function previewPlan(
  ctx: AppContext,
  read: Read,
  values: PlanValues,
): Promise<PlanPreview> {
  const shore = await readShore(read, values.shoreId);
  const tide = shore === null ? null : await readShoreTide(ctx.tides, read, shore);
  if (shore === null || tide === null) {
    throw refuseField('shoreId', 'There is no water to plan with at this shore.');
  }
  const readBack = readPattern(values.pattern, values.fromOn, shore.zone, 'pattern');
  const dates = planDates(seasonPlan(values, readBack.pattern), shore, tide.curve);
  if (!dates.isGranted) throw refusePlan(dates.reasons[0]);
  return { ...readBack, shore, tide, dates: dates.value };
}

/** A rule's text as a pattern, in words, with its next five dates. */
export function readPattern(
  text: string,
  fromOn: CalendarDay,
  zone: string,
  field: string,
): {
  readonly pattern: Pattern;
  readonly sentence: string;
  readonly nextDates: readonly CalendarDay[];
} {
  const pattern = patternOf(text);
  if (!pattern.isGranted) throw refuseField(field, sayPatternRefusal(pattern.reasons[0]));
  const sentence = patternSentence(pattern.value, zone);
  if (!sentence.isGranted) throw refuseField(field, sayPatternRefusal(sentence.reasons[0]));
  const next = nextDates(pattern.value, fromOn, datesReadBack, zone);
  if (!next.isGranted) throw refuseField(field, sayPatternRefusal(next.reasons[0]));
  return { pattern: pattern.value, sentence: sentence.value, nextDates: next.value };
}

function seasonPlan(values: PlanValues, pattern: Pattern): SeasonPlan {
  const { fromOn, toOn } = values;
  return {
    pattern,
    fromOn,
    toOn,
    windowRules: windowRulesOf(values),
    exceptions: values.exceptions.map(({ on, kind, reason }) => {
      const said = { on, reason: reason ?? '' };
      return kind === 'add' ? { kind, ...said, isByHand: true } : { kind, ...said };
    }),
    closures: [],
  };
}

function refusePlan(reason: PlanRefusal): Problem {
  switch (reason.why) {
    case 'two-exceptions-for-a-date':
      return refuseField('exceptions', `There are two decisions for ${reason.on}.`);
    case 'closure-ends-before-it-begins':
      return refuseField('shoreId', 'A closure of this shore ends before it begins.');
    case 'span-too-long':
      return refuseField('toOn', `A plan spans at most ${reason.mostDays} days.`);
    default:
      return refuseField('pattern', sayPatternRefusal(reason));
  }
}

function refuseField(field: string, message: string): Problem {
  const fields: FieldProblem[] = [{ where: 'body', field, message }];
  return new Problem('not-understood', 'The plan cannot be used as it is', { fields });
}
