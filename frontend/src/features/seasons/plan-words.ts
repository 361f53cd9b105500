import { hoursAndMinutes } from '#frontend/words/duration-words.ts';
import { sayNoWindow } from '#frontend/words/no-window-words.ts';
import type { PlanDate, PlanPreview, PlanSettings } from '#shared/contracts/season-plans.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { clockAt, formatDay, fromIso, instantOf, yearOf } from '#shared/kernel/time.ts';
import { numberWord } from '#frontend/words/number-words.ts';
import { metres } from '#frontend/words/tide-words.ts';

const ONE_WEEKDAY = /^Every (?<weekday>(?:Mon|Tues|Wednes|Thurs|Fri|Satur|Sun)day)$/;

/** What comes of the dates of a plan. */
export interface PlanCounts {
  readonly sessions: number;
  readonly skipped: number;
  /** Taken, but over: no session is made of them. */
  readonly past: number;
}

export function countDates(dates: readonly PlanDate[]): PlanCounts {
  const isSession = ({ isTaken, isPast, sessionId }: PlanDate): boolean =>
    sessionId !== null || (isTaken && !isPast);
  const sessions = dates.filter(isSession).length;
  const past = dates.filter((date) => date.isTaken && !isSession(date)).length;
  return { sessions, past, skipped: dates.length - sessions - past };
}

/**
 * What a plan comes to: '21 Saturdays: 11 sessions, 10 skipped'; by its sentence where its dates
 * are not all of one weekday: 'Every second Saturday and Sunday: 11 sessions, 10 skipped'.
 */
export function planHeadline({ sentence, dates }: PlanPreview): string {
  const weekday = ONE_WEEKDAY.exec(sentence)?.groups?.['weekday'];
  const ofPattern = dates.filter(({ source }) => source === 'pattern').length;
  const added = dates.length - ofPattern;
  const what =
    weekday === undefined ? sentence : `${ofPattern} ${weekday}${ofPattern === 1 ? '' : 's'}`;
  const more = added === 0 ? '' : ` and ${added} added`;
  const { sessions, skipped, past } = countDates(dates);
  const parts = [
    `${sessions} ${sessions === 1 ? 'session' : 'sessions'}`,
    ...(skipped === 0 ? [] : [`${skipped} skipped`]),
    ...(past === 0 ? [] : [`${past} past`]),
  ];
  return `${what}${more}: ${parts.join(', ')}`;
}

/** Why a skipped date has no session, to stand in its row. */
export function skippedInWords(date: PlanDate, zone: string): string {
  switch (date.skippedBy) {
    case 'hand':
      return date.handReason === null ? 'skipped by hand' : `skipped by hand: ${date.handReason}`;
    case 'closure':
      return 'the shore is closed';
    case 'other-date':
      return 'another date of the plan is on this day';
    case 'rules':
    case null:
      return tellingReason(date, zone);
  }
}

type Reason = PlanDate['day']['reasons'][number];

/**
 * What stands against the likelier low water of a day. The other one is mostly at night, which
 * goes without saying, as does the dark where something else is in the way too.
 */
function tellingReason({ day }: PlanDate, zone: string): string {
  const noonAt = instantOf(day.on, '12:00', zone);
  const lows = [...new Set(day.reasons.map(lowWaterOf))].sort((a, b) => {
    const against = (at: Instant | null): number =>
      day.reasons.filter((one) => lowWaterOf(one) === at).length;
    const away = (at: Instant | null): number => (at === null ? 0 : Math.abs(at - noonAt));
    return against(a) - against(b) || away(a) - away(b);
  });
  const ofLow = day.reasons.filter((one) => lowWaterOf(one) === lows[0]);
  const telling = ofLow.filter(({ why }) => why !== 'dark');
  const [first = '', ...others] = (telling.length > 0 ? telling : ofLow).map((reason) =>
    sayNoWindow(reason, zone),
  );
  return [first, ...others.map((words) => words.replace(/^low water \S+ ?/, ''))].join(', ');
}

function lowWaterOf(reason: Reason): Instant | null {
  return reason.why === 'no-low-water' ? null : fromIso(reason.lowWaterAt);
}

/** What of a taken date is not as usual: 'cut at 07:00, 2:15 left', 'by hand, 1:16 left'. */
export function takenInWords(date: PlanDate, zone: string): string | null {
  const left = date.leftMinutes === null ? '' : `, ${hoursAndMinutes(date.leftMinutes)} left`;
  const by = date.handReason === null ? '' : `: ${date.handReason}`;
  if (date.isByHand) return `by hand${left}${by}`;
  const cuts = cutsInWords(date, zone);
  const words = [
    ...(cuts.length === 0 ? [] : [`cut ${cuts.join(' and ')}${left}`]),
    ...(date.source === 'added' ? [`added${by}`] : []),
    ...(date.isPast && date.sessionId === null ? ['past, no session'] : []),
  ];
  return words.length === 0 ? null : words.join(', ');
}

type Cut = NonNullable<PlanDate['day']['window']>['cuts'][number];

function cutsInWords({ day }: PlanDate, zone: string): string[] {
  const cuts = (day.window?.cuts ?? []).filter(({ edge }) => edge !== 'end');
  return [...new Set(cuts.flatMap((cut) => cutWords(cut, day, zone)))];
}

/** The end of the session itself cuts nothing: off the shore is what counts. */
function cutWords(cut: Cut, day: PlanDate['day'], zone: string): string[] {
  const clock = clockAt(fromIso(cut.at), zone);
  const isStart = cut.edge === 'start';
  switch (cut.by) {
    case 'low-water-time':
      return [];
    case 'hours':
      return [`at ${clock}`];
    case 'daylight': {
      const sunIso = isStart ? day.sunriseAt : day.sunsetAt;
      const awayMinutes =
        sunIso === null ? Infinity : Math.abs(fromIso(cut.at) - fromIso(sunIso)) / 60_000;
      if (awayMinutes <= 1) return [isStart ? 'at sunrise' : 'at sunset'];
      return ['by the dark'];
    }
    case 'working-level':
      return ['by the water'];
    case 'cut-off-level':
      return ['by the way off'];
  }
}

/** One strip aloud: its window and deadlines, or that it is skipped. */
export function stripInWords({ day, isTaken }: PlanDate, zone: string): string {
  const name = `Water of ${formatDay(day.on, 'long')}`;
  const { window } = day;
  if (!isTaken || window === null) return `${name}, skipped`;
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  return `${name}: on the shore ${clock(window.startsAt)}, lower shore clear by ${clock(window.lowerShoreClearBy)}, off the shore by ${clock(window.offTheShoreBy)}`;
}

/** How many sessions of a plan are published: 'none published', 'two published'. */
export function publishedInWords(published: number): string {
  return `${published === 0 ? 'none' : numberWord(published)} published`;
}

/** The span of a plan: '5 June to 23 October', with years where they differ. */
export function spanInWords(fromOn: CalendarDay, toOn: CalendarDay): string {
  const style = yearOf(fromOn) === yearOf(toOn) ? 'dayMonth' : 'dayMonthYear';
  return `${formatDay(fromOn, style)} to ${formatDay(toOn, 'dayMonthYear')}`;
}

/** The rules of a plan in three lines, to be read before they are changed. */
export function rulesInWords(
  settings: PlanSettings,
  names: {
    readonly shore: string;
    readonly sentence: string;
    readonly slots: readonly string[];
  },
): readonly { readonly name: string; readonly words: string }[] {
  const { fromOn, toOn, daylightMarginMinutes, lowestLevelM } = settings;
  const sentence = names.sentence.charAt(0).toLowerCase() + names.sentence.slice(1);
  const light =
    daylightMarginMinutes === 0
      ? 'in daylight'
      : `in daylight, ${daylightMarginMinutes} min from the dark`;
  const level = lowestLevelM === null ? '' : `, low water up to ${metres(lowestLevelM)} m`;
  return [
    { name: 'Pattern', words: `${names.shore}, ${sentence}, ${spanInWords(fromOn, toOn)}` },
    {
      name: 'Window',
      words: `before ${hoursAndMinutes(settings.minutesBeforeLow)}, after ${hoursAndMinutes(settings.minutesAfterLow)}`,
    },
    {
      name: 'Rules',
      words: `${settings.earliestClock} to ${settings.latestClock}, ${light}${level}, no shorter than ${hoursAndMinutes(settings.minimumMinutes)}`,
    },
    { name: 'Slots', words: names.slots.join(', ') },
  ];
}
