import { counted, listed } from '#frontend/words/number-words.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import type { DayFacts } from './month-days.ts';

type WhyNot = NonNullable<NonNullable<DayFacts['home']>['whyNot']>;

/** A row of the strand list: a month's name, a day, or a run of days that no low water serves. */
export type StrandRow =
  | { readonly kind: 'month'; readonly on: CalendarDay; readonly edge: number }
  | { readonly kind: 'day'; readonly day: DayFacts; readonly edge: number }
  | {
      readonly kind: 'run';
      readonly from: CalendarDay;
      readonly to: CalendarDay;
      readonly words: string;
      readonly edge: number;
    };

const LEAST_EDGE = 64;
const MOST_EDGE = 98;
const MIDDLE_EDGE = 81;

/** Where the sea ends on a day, of the 104 units at its left: the higher the low water, the further. */
export function seaEdge(day: DayFacts): number {
  const low = day.home?.daylightLow ?? null;
  if (low === null) return MIDDLE_EDGE;
  const edge = 68 + ((low.heightM - 0.45) / 1.6) * 28;
  return Math.min(MOST_EDGE, Math.max(LEAST_EDGE, edge));
}

/**
 * The rows of the strand list. A day without a session and without a usable low water falls into
 * a run with its neighbours; today always has a row of its own.
 */
export function strandRows(days: readonly DayFacts[], today: CalendarDay): StrandRow[] {
  const rows: StrandRow[] = [];
  let run: DayFacts[] = [];
  const closeRun = (): void => {
    const first = run[0];
    const last = run[run.length - 1];
    if (first !== undefined && last !== undefined) {
      const edge = run.reduce((sum, day) => sum + seaEdge(day), 0) / run.length;
      rows.push({ kind: 'run', from: first.on, to: last.on, words: runInWords(run), edge });
    }
    run = [];
  };
  days.forEach((day, index) => {
    if (index === 0 || day.on.endsWith('-01')) {
      closeRun();
      rows.push({ kind: 'month', on: day.on, edge: seaEdge(day) });
    }
    const isBare = day.sessions.length === 0 && day.home?.isUsable === false && day.on !== today;
    if (isBare) {
      run.push(day);
    } else {
      closeRun();
      rows.push({ kind: 'day', day, edge: seaEdge(day) });
    }
  });
  closeRun();
  return rows;
}

const lowWaterIs: Partial<Record<WhyNot, string>> = {
  dark: 'in the dark',
  'too-high': 'too high',
  'out-of-hours': 'out of hours',
};

/** Why no low water of a run serves: 'six days, low water in the dark, too high or out of hours'. */
function runInWords(run: readonly DayFacts[]): string {
  const whys = new Set(run.flatMap(({ home }) => (home?.whyNot ? [home.whyNot] : [])));
  const ofLowWater = [...whys].flatMap((why) => lowWaterIs[why] ?? []);
  const reasons = [
    ...(ofLowWater.length > 0 ? [`low water ${listed(ofLowWater, 'or')}`] : []),
    ...(whys.has('too-short') ? ['too little time on the shore'] : []),
    ...(whys.has('no-low-water') ? ['no low water by day'] : []),
  ];
  return [counted(run.length, 'day'), ...reasons].join(', ');
}
