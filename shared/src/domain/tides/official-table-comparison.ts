import type { Instant } from '#shared/kernel/time.ts';
import { pairsOf } from './official-table-pairs.ts';
import type { EventPair } from './official-table-pairs.ts';
import type { TableEvent } from './official-table-reading.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** What the differences between a table and the prediction look like. */
export type ComparisonVerdict =
  'agrees' | 'zone-mistake' | 'datum' | 'units' | 'swapped' | 'other-place';

/** One event held against its prediction: the table's figure less the predicted one. */
export interface ComparedEvent {
  readonly event: TableEvent;
  readonly predicted: TideExtreme;
  readonly minutesLater: number;
  readonly higherM: number;
}

/** An official table held against the prediction. Medians and worsts are of sizes, unsigned; null without a pair. */
export interface TableComparison {
  readonly verdict: ComparisonVerdict;
  readonly pairs: readonly ComparedEvent[];
  readonly medianMinutes: number | null;
  readonly worstMinutes: number | null;
  readonly medianM: number | null;
  readonly worstM: number | null;
  /** A shift by whole half hours, positive when the table is late; else null. */
  readonly constantMinutes: number | null;
  /** Where that shift holds for a part of the table only, as in summer: from and to, inclusive. */
  readonly constantWithin: { readonly fromAt: Instant; readonly toAt: Instant } | null;
  /** The height by which the table is higher throughout; else null. */
  readonly constantM: number | null;
  /** Predicted within the span of the table, and not in it. */
  readonly missing: readonly TideExtreme[];
  /** In the table, and not predicted. */
  readonly extra: readonly TableEvent[];
}

const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;

/** Zones differ by no more than this, in steps of half an hour. */
const WIDEST_SHIFT_MINUTES = 14 * 60;
const STEP_MINUTES = 30;

/** Times of another table than the one predicted scatter by more than this. */
const SAME_TIME_MINUTES = 15;
const SAME_HEIGHT_M = 0.25;
const MOST = 0.8;

/** A mistake of the zone is a whole step to this; a constant between the steps is of the place. */
const ZONE_MINUTES = 6;

/** Tables that are right in winter and an hour off in summer change over twice a year. */
const MOST_CHANGES = 6;

/**
 * Holds a table against the prediction for the place. A shift by whole half hours is named as a
 * mistake of the zone (a whole year of it, or summer alone), a constant height as another datum,
 * heights in proportion as other units, highs below lows as exchanged marks, and whatever else does
 * not agree as another place. Throws a RangeError on a table without events.
 */
export function compareWithPrediction(
  events: readonly TableEvent[],
  curve: TideCurve,
): TableComparison {
  const first = events[0];
  const last = events.at(-1);
  if (first === undefined || last === undefined) throw new RangeError('No events to compare');
  const extremes = curve.extremes(first.at - DAY_MS, last.at + DAY_MS);
  const shift = shiftOf(events, extremes);
  const shiftMinutes = shift?.pairedAt ?? 0;
  const paired = pairsOf(events, extremes, shiftMinutes * MINUTE_MS);
  const pairs = paired.map(({ event, predicted }): ComparedEvent => ({
    event,
    predicted,
    minutesLater: (event.at - predicted.at) / MINUTE_MS,
    higherM: event.heightM - predicted.heightM,
  }));
  const minutes = pairs.map(({ minutesLater }) => Math.abs(minutesLater));
  const heights = pairs.map(({ higherM }) => Math.abs(higherM));
  const constantM = constantHeightM(pairs);
  const isPaired = new Set(paired.map(({ event }) => event));
  const isMet = new Set(paired.map(({ predicted }) => predicted));
  const fromAt = first.at - shiftMinutes * MINUTE_MS;
  const toAt = last.at - shiftMinutes * MINUTE_MS;
  const extra = events.filter((event) => !isPaired.has(event));
  const comparison = {
    pairs,
    medianMinutes: median(minutes),
    worstMinutes: largest(minutes),
    medianM: median(heights),
    worstM: largest(heights),
    constantMinutes: shift?.minutes ?? null,
    constantWithin: shift?.within ?? null,
    constantM,
    missing: extremes.filter((one) => !isMet.has(one) && one.at >= fromAt && one.at <= toAt),
    extra,
  };
  return { ...comparison, verdict: verdictOn(events, comparison) };
}

function verdictOn(
  events: readonly TableEvent[],
  comparison: Omit<TableComparison, 'verdict'>,
): ComparisonVerdict {
  const { pairs, constantMinutes, constantM, medianMinutes, medianM } = comparison;
  if (areMarksExchanged(events)) return 'swapped';
  const isMostPaired = pairs.length >= events.length * MOST;
  if (medianMinutes === null || medianM === null) return 'other-place';
  const isInTime = constantMinutes !== null || medianMinutes <= SAME_TIME_MINUTES;
  if (!isMostPaired || !isInTime) return 'other-place';
  if (isOfOtherUnits(pairs)) return 'units';
  if (constantMinutes !== null) return 'zone-mistake';
  if (constantM !== null) return 'datum';
  return medianM <= SAME_HEIGHT_M ? 'agrees' : 'other-place';
}

/** A shift of the whole table or of a stretch of it, and the one by which its tides are found. */
interface ZoneShift {
  readonly minutes: number;
  readonly pairedAt: number;
  readonly within: TableComparison['constantWithin'];
}

function shiftOf(
  events: readonly TableEvent[],
  extremes: readonly TideExtreme[],
): ZoneShift | null {
  const base = bestShift(events, extremes);
  const pairs = pairsOf(events, extremes, base * MINUTE_MS);
  const ofStretch = stretchShift(pairs, base, events.length);
  if (ofStretch !== null) return ofStretch;
  const isThroughout = pairs.filter((pair) => isNear(pair, base)).length >= events.length * MOST;
  return base !== 0 && isThroughout ? { minutes: base, pairedAt: base, within: null } : null;
}

function isNear({ event, predicted }: EventPair, minutes: number): boolean {
  return Math.abs((event.at - predicted.at) / MINUTE_MS - minutes) <= SAME_TIME_MINUTES;
}

/** The shift of half of the events or more that agrees far better than no shift does. */
function bestShift(events: readonly TableEvent[], extremes: readonly TideExtreme[]): number {
  const costOf = (minutes: number): number => {
    const pairs = pairsOf(events, extremes, minutes * MINUTE_MS);
    const near = pairs.filter((pair) => isNear(pair, minutes));
    if (minutes !== 0 && near.length * 2 < events.length) return Infinity;
    const offs = pairs.map(({ event, predicted }) => {
      return Math.abs((event.at - predicted.at) / MINUTE_MS - minutes);
    });
    // A centimetre counts as a minute: in times alone one tide looks much like the next.
    const off = median(offs);
    const late = median(
      pairs.map(({ event, predicted }) => (event.at - predicted.at) / MINUTE_MS - minutes),
    );
    if (minutes !== 0 && (late === null || Math.abs(late) > ZONE_MINUTES)) return Infinity;
    const scatterM = heightScatterM(pairs);
    return off === null || scatterM === null ? Infinity : off + 100 * scatterM;
  };
  let best = 0;
  let leastCost = costOf(0) / 2;
  for (let size = STEP_MINUTES; size <= WIDEST_SHIFT_MINUTES; size += STEP_MINUTES) {
    for (const minutes of [size, -size]) {
      const cost = costOf(minutes);
      if (cost >= leastCost) continue;
      leastCost = cost;
      best = minutes;
    }
  }
  return best;
}

/** Two shifts an hour or half of one apart, each in a stretch of the year: summer and winter. */
function stretchShift(pairs: readonly EventPair[], base: number, count: number): ZoneShift | null {
  for (const apart of [60, -60, 30, -30]) {
    const sides = pairs.flatMap((pair) => {
      const isBase = isNear(pair, base);
      const isOther = isNear(pair, base + apart);
      return isBase === isOther ? [] : [{ at: pair.event.at, isOther }];
    });
    const others = sides.filter(({ isOther }) => isOther).length;
    const least = count * (1 - MOST);
    if (others < least || sides.length - others < least) continue;
    const changes = sides.filter((side, place) => {
      const before = sides[place - 1];
      return before !== undefined && before.isOther !== side.isOther;
    }).length;
    if (sides.length < count * MOST || changes > MOST_CHANGES) continue;
    const isWrongOther = base === 0;
    const wrong = sides.filter(({ isOther }) => isOther === isWrongOther);
    const within = { fromAt: wrong[0]?.at ?? 0, toAt: wrong.at(-1)?.at ?? 0 };
    return { minutes: isWrongOther ? base + apart : base, pairedAt: base, within };
  }
  return null;
}

/** How far heights lie from the straight line that fits them best, in predicted metres. */
function heightScatterM(pairs: readonly EventPair[]): number | null {
  const { slope, offsetM } = heightFit(pairs);
  const scale = Math.max(Math.abs(slope), 1e-6);
  return median(
    pairs.map(({ event, predicted }) =>
      Math.abs((event.heightM - offsetM - slope * predicted.heightM) / scale),
    ),
  );
}

function heightFit(pairs: readonly EventPair[]): {
  readonly slope: number;
  readonly offsetM: number;
} {
  const count = Math.max(1, pairs.length);
  const meanX = pairs.reduce((sum, { predicted }) => sum + predicted.heightM, 0) / count;
  const meanY = pairs.reduce((sum, { event }) => sum + event.heightM, 0) / count;
  let products = 0;
  let squares = 0;
  for (const { event, predicted } of pairs) {
    products += (predicted.heightM - meanX) * (event.heightM - meanY);
    squares += (predicted.heightM - meanX) ** 2;
  }
  const slope = squares === 0 ? 1 : products / squares;
  return { slope, offsetM: meanY - slope * meanX };
}

function isOfOtherUnits(pairs: readonly EventPair[]): boolean {
  const { slope } = heightFit(pairs);
  const ratios = [1 / 0.3048, 0.3048, 100, 0.01, 30.48, 1 / 30.48];
  return ratios.some((ratio) => Math.abs(slope / ratio - 1) < 0.1);
}

function constantHeightM(pairs: readonly ComparedEvent[]): number | null {
  const middle = median(pairs.map(({ higherM }) => higherM));
  if (middle === null) return null;
  const near = pairs.filter(({ higherM }) => Math.abs(higherM - middle) <= 0.1).length;
  const isConstant = Math.abs(middle) >= 0.1 && near >= pairs.length * MOST;
  return isConstant ? middle : null;
}

function areMarksExchanged(events: readonly TableEvent[]): boolean {
  const below = events.filter((event, place) => {
    const before = events[place - 1];
    if (before === undefined || before.kind === event.kind) return false;
    return event.kind === 'high' ? event.heightM < before.heightM : event.heightM > before.heightM;
  });
  return below.length * 2 > events.length;
}

/** The middle of the figures; null when there are none. */
function median(figures: readonly number[]): number | null {
  const sorted = figures.toSorted((a, b) => a - b);
  const upper = sorted[Math.floor(sorted.length / 2)];
  const lower = sorted[Math.ceil(sorted.length / 2) - 1];
  return upper === undefined || lower === undefined ? null : (lower + upper) / 2;
}

function largest(figures: readonly number[]): number | null {
  return figures.length === 0 ? null : figures.reduce((most, figure) => Math.max(most, figure));
}
