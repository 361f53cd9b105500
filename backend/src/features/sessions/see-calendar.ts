import type { AppContext } from '#backend/app-context.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import { readCrewFacts, readSlotsOfSessions } from '#backend/features/slots/slots.reader.ts';
import type { CrewFacts, SlotFacts } from '#backend/features/slots/slots.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import { readShoreTide } from '#backend/features/tides/tides.reader.ts';
import type { ShoreTide } from '#backend/features/tides/tides.reader.ts';
import { daylightLow, tideMarks, windowOn } from '#shared/domain/tides/shore-water.ts';
import type { TideMark } from '#shared/domain/tides/shore-water.ts';
import type { TideExtreme, TideHeight } from '#shared/domain/tides/tide-curve.ts';
import type { NoWindowReason } from '#shared/domain/tides/working-window.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, dayAt, daysBetween, startOfDay } from '#shared/kernel/time.ts';
import { may } from '#shared/policy/policy.ts';
import { readSessionsBetween } from './sessions.reader.ts';
import type { Session } from './sessions.reader.ts';

const curveStepMinutes = 30;
const longestSpanDays = 62;

/** One local day at the home shore. */
export interface ShoreDay {
  readonly on: CalendarDay;
  readonly daylightLow: TideExtreme | null;
  /** Null where a working window can be had; else the reasons, at least one. */
  readonly whyNot: readonly [NoWindowReason, ...NoWindowReason[]] | null;
}

/** Everything that the month and the strand list show. */
export interface CalendarSeen {
  readonly zone: string;
  readonly now: Instant;
  readonly todayOn: CalendarDay;
  readonly shores: readonly Shore[];
  readonly homeWater: {
    readonly tide: ShoreTide;
    readonly curve: readonly TideHeight[];
    readonly days: readonly ShoreDay[];
    readonly marks: readonly TideMark[];
  } | null;
  readonly sessions: readonly Session[];
  readonly slots: readonly SlotFacts[];
  readonly crew: CrewFacts;
}

/**
 * The sessions and the home shore's water from one local day to another, both included. At
 * most 62 days. Five statements, however many sessions there are.
 */
export async function seeCalendar(
  ctx: AppContext,
  actor: Actor,
  fromOn: CalendarDay,
  toOn: CalendarDay,
): Promise<CalendarSeen> {
  const spanDays = daysBetween(fromOn, toOn);
  if (spanDays < 0 || spanDays > longestSpanDays) {
    throw new Problem('not-understood', 'The span of days cannot be read', {
      fields: [
        {
          where: 'query',
          field: 'to',
          message: `Choose a last day from ${fromOn} to ${addDays(fromOn, longestSpanDays)}`,
        },
      ],
    });
  }
  const facts = await ctx.reading(async (read) => {
    const sessions = await readSessionsBetween(
      read,
      fromOn,
      toOn,
      may(actor.roles, 'session.see-drafts'),
    );
    return {
      sessions,
      shores: await readShores(read),
      slots: await readSlotsOfSessions(
        read,
        sessions.map(({ id }) => id),
      ),
      crew: await readCrewFacts(read, actor.personId),
    };
  });
  if (facts.crew === null) throw new Problem('not-found', 'There is no such person');
  const now = ctx.clock.now();
  const home = facts.shores[0];
  const zone = home?.zone ?? ctx.group.zone;
  return {
    ...facts,
    crew: facts.crew,
    zone,
    now,
    todayOn: dayAt(now, zone),
    homeWater: home === undefined ? null : await homeWater(ctx, home, fromOn, toOn),
  };
}

async function homeWater(
  ctx: AppContext,
  home: Shore,
  fromOn: CalendarDay,
  toOn: CalendarDay,
): Promise<CalendarSeen['homeWater']> {
  const tide = await ctx.reading((read) => readShoreTide(ctx.tides, read, home));
  if (tide === null) return null;
  const { curve } = tide;
  const days: ShoreDay[] = [];
  for (let on = fromOn; on <= toOn; on = addDays(on, 1)) {
    const window = windowOn(home, curve, on);
    days.push({
      on,
      daylightLow: daylightLow(home, curve, on),
      whyNot: window.isGranted ? null : window.reasons,
    });
  }
  return {
    tide,
    curve: curve.series(
      startOfDay(fromOn, home.zone),
      startOfDay(addDays(toOn, 1), home.zone),
      curveStepMinutes,
    ),
    days,
    marks: tideMarks(curve, fromOn, toOn, home.zone),
  };
}
