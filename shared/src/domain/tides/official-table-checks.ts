import type { ReadEvent } from './official-table-rows.ts';
import type { ProblemWhy, TableEvent, TableProblem } from './official-table-reading.ts';

/** An event whose instant is settled. */
interface Settled extends ReadEvent {
  readonly at: number;
}

interface Marked extends Settled {
  readonly kind: 'high' | 'low';
}

interface DatedRow {
  readonly row: number;
  readonly at: number;
}

interface Checked {
  readonly events: readonly TableEvent[];
  readonly problems: readonly TableProblem[];
}

const CLOSEST_MS = 2 * 3_600_000;

/** A date further from the middle of a year's table has a slip in its year. */
const FARTHEST_MS = 400 * 24 * 3_600_000;

/** A gap so much longer than the usual one hides a high or low water that is not in the table. */
const GAP_WITH_ONE_MISSING = 1.5;

/**
 * The lines held against one another: what is repeated, out of order, or does not alternate between
 * high and low. Events come out in order of time. `leftOut` are the rows that could not be read.
 */
export function inOrder(read: readonly ReadEvent[], leftOut: readonly number[]): Checked {
  const problems: TableProblem[] = [];
  const report = (isLeftOut: boolean) => (row: number, why: ProblemWhy, message: string) => {
    problems.push({ row, why, message, isLeftOut });
  };
  const once = withoutRepeats(read, report(true));
  const ordered = withoutStrays(once, report(true));
  const settled = ordered
    .toSorted((a, b) => a.shownAt[0] - b.shownAt[0])
    .map((event, place, all) => settle(event, all[place - 1], all[place + 1], report(false)));
  const marked = withKinds(settled);
  const events = alternating(marked, report);
  const without = new Set([...leftOut, ...problems.map(({ row }) => row)]);
  events.forEach((event, place) => {
    const before = events[place - 1];
    if (before === undefined) return;
    if (event.at - before.at < CLOSEST_MS) {
      const message = `${event.text} is less than 2 hours after ${before.text}.`;
      report(false)(event.row, 'close-together', message);
    }
    if (event.kind !== before.kind) return;
    // A line between them that is listed already explains it.
    for (let row = before.row; row <= event.row; row += 1) if (without.has(row)) return;
    const other = event.kind === 'high' ? 'low' : 'high';
    const message = `Two ${event.kind} waters follow one another: no ${other} water between ${before.text} and ${event.text}.`;
    report(false)(event.row, 'not-alternating', message);
  });
  return {
    events: events.map(({ at, kind, heightM, row }) => ({ at, kind, heightM, row })),
    problems,
  };
}

type Report = (row: number, why: ProblemWhy, message: string) => void;

function withoutRepeats(events: readonly ReadEvent[], report: Report): ReadEvent[] {
  const seen = new Map<number, ReadEvent>();
  return events.filter((event) => {
    const first = seen.get(event.shownAt[0]);
    if (first === undefined) {
      seen.set(event.shownAt[0], event);
      return true;
    }
    const isSame = first.heightM === event.heightM;
    const what = isSame ? 'stands' : 'stands with another height';
    report(event.row, 'repeated', `${event.text} ${what} in line ${first.row} already.`);
    return false;
  });
}

/**
 * Keeps the longest run of lines whose times rise, so that a slip condemns itself alone, and of
 * these the ones within some thirteen months of the middle one.
 */
function withoutStrays(events: readonly ReadEvent[], report: Report): ReadEvent[] {
  const rows = new Map<number, DatedRow>();
  for (const { row, shownAt } of events) {
    const at = Math.min(shownAt[0], rows.get(row)?.at ?? Infinity);
    rows.set(row, { row, at });
  }
  const rise = longestRise([...rows.values()]);
  const middleAt = rise[Math.floor(rise.length / 2)]?.at ?? 0;
  const kept = new Set(
    rise.filter(({ at }) => Math.abs(at - middleAt) <= FARTHEST_MS).map(({ row }) => row),
  );
  const strays = new Set<number>();
  return events.filter((event) => {
    if (kept.has(event.row)) return true;
    if (!strays.has(event.row)) {
      strays.add(event.row);
      const message = `${event.text} is out of order, or far from the other dates.`;
      report(event.row, 'out-of-order', message);
    }
    return false;
  });
}

function longestRise(rows: readonly DatedRow[]): DatedRow[] {
  // The last place of the best run of each length, and for each place the one before it.
  const ends: number[] = [];
  const before: (number | undefined)[] = [];
  const atOf = (place: number | undefined): number =>
    place === undefined ? Infinity : (rows[place]?.at ?? Infinity);
  rows.forEach(({ at }, place) => {
    let low = 0;
    let high = ends.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (atOf(ends[middle]) < at) low = middle + 1;
      else high = middle;
    }
    before[place] = ends[low - 1];
    ends[low] = place;
  });
  const kept: DatedRow[] = [];
  for (let place = ends.at(-1); place !== undefined; place = before[place]) {
    const row = rows[place];
    if (row !== undefined) kept.push(row);
  }
  return kept;
}

/** In the hour that clocks repeat, the showing that its neighbours leave room for; else the first. */
function settle(
  event: ReadEvent,
  before: ReadEvent | undefined,
  after: ReadEvent | undefined,
  report: Report,
): Settled {
  const [firstAt, againAt] = event.shownAt;
  if (againAt === undefined) return { ...event, at: firstAt };
  const isFirstTooEarly = before !== undefined && firstAt - before.shownAt[0] < CLOSEST_MS;
  const isAgainTooLate = after !== undefined && after.shownAt[0] - againAt < CLOSEST_MS;
  const isSecond = isFirstTooEarly && !isAgainTooLate;
  const which = isSecond ? 'second, after' : 'first, before';
  const message = `Clocks show ${event.text} twice: it was read as the ${which} they go back.`;
  report(event.row, 'time-twice', message);
  return { ...event, at: isSecond ? againAt : firstAt };
}

/**
 * Highs and lows by alternation where the table does not mark them: in every stretch without a gap,
 * the one of two ways that its heights speak for.
 */
function withKinds(events: readonly Settled[]): Marked[] {
  const longMs = usualGapMs(events) * GAP_WITH_ONE_MISSING;
  const marked: Marked[] = [];
  let from = 0;
  events.forEach((event, place) => {
    const next = events[place + 1];
    if (next !== undefined && next.at - event.at <= longMs) return;
    const stretch = events.slice(from, place + 1);
    const isFirstHigh =
      stretch.length > 1 ? rises(stretch) < 0 : isAbove(event, events[place - 1], next);
    stretch.forEach((one, step) => {
      const kind = (step % 2 === 0) === isFirstHigh ? 'high' : 'low';
      marked.push({ ...one, kind: one.kind ?? kind });
    });
    from = place + 1;
  });
  return marked;
}

/** Positive when the first is a low water. */
function rises(stretch: readonly Settled[]): number {
  return stretch.reduce((sum, event, place) => {
    const next = stretch[place + 1];
    if (next === undefined) return sum;
    return sum + (next.heightM - event.heightM) * (place % 2 === 0 ? 1 : -1);
  }, 0);
}

function isAbove(event: Settled, before: Settled | undefined, after: Settled | undefined): boolean {
  const beside = [before, after].flatMap((one) => (one === undefined ? [] : [one.heightM]));
  const mean = beside.reduce((sum, heightM) => sum + heightM, 0) / Math.max(1, beside.length);
  return event.heightM > mean;
}

function usualGapMs(events: readonly Settled[]): number {
  const gaps = events.slice(1).map((event, place) => event.at - (events[place]?.at ?? event.at));
  gaps.sort((a, b) => a - b);
  return gaps[Math.floor(gaps.length / 2)] ?? Infinity;
}

/** Leaves out an event that contradicts both its neighbours, unless the whole table does so. */
function alternating(
  events: readonly Marked[],
  report: (isLeftOut: boolean) => Report,
): readonly Marked[] {
  const usualMs = usualGapMs(events);
  const against = events.filter((event, place) => {
    const before = events[place - 1];
    const after = events[place + 1];
    if (before === undefined || after === undefined) return false;
    return contradicts(event, before, usualMs) && contradicts(event, after, usualMs);
  });
  const [first] = against;
  if (first === undefined) return events;
  if (against.length * 2 > events.length) {
    const message = 'High waters lie below low waters throughout: are their marks exchanged?';
    report(false)(first.row, 'marks-exchanged', message);
    return events;
  }
  for (const { row, text, kind } of against) {
    const message = `${text} is no ${kind} water by the heights before and after it.`;
    report(true)(row, 'not-alternating', message);
  }
  const left = new Set(against);
  return events.filter((event) => !left.has(event));
}

function contradicts(event: Marked, beside: Marked, usualMs: number): boolean {
  if (event.kind === beside.kind) {
    return Math.abs(event.at - beside.at) <= usualMs * GAP_WITH_ONE_MISSING;
  }
  return event.kind === 'high' ? event.heightM <= beside.heightM : event.heightM >= beside.heightM;
}
