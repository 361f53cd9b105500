import type { Instant } from '#shared/kernel/time.ts';
import { pairsOf } from './official-table-pairs.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** A high or low of the bent curve. */
export interface Knot extends TideExtreme {
  /** The place among the plain curve's extremes of the one that it is; null when it is none. */
  readonly plain: number | null;
}

/** How the table moves an extreme. */
interface Shift {
  readonly at: Instant;
  readonly laterMs: number;
  readonly higherM: number;
}

const HAND_OVER_MS = 2 * 86_400_000;

/** So that a few unmoved extremes stand on either side of the hand-over. */
const MARGIN_MS = HAND_OVER_MS + 3 * 86_400_000;

/** A small predicted high and low that the table does not have is left out, up to this range. */
const SMALL_PAIR_M = 0.2;

/** Below the lower of two highs, or above the higher of two lows, that follow one another. */
const CLEARANCE_M = 0.01;

/** Every high and low of the curve bent to a table, alternating, the outermost not moved at all. */
export function knotsOf(
  curve: TideCurve,
  table: readonly TideExtreme[],
): { readonly knots: readonly Knot[]; readonly plain: readonly TideExtreme[] } {
  const events = table.toSorted((a, b) => a.at - b.at);
  const first = events[0];
  const last = events.at(-1);
  if (first === undefined || last === undefined) return { knots: [], plain: [] };
  const plain = curve.extremes(first.at - MARGIN_MS, last.at + MARGIN_MS);
  const places = new Map(plain.map((extreme, place) => [extreme, place]));
  const paired = pairsOf(events, plain).flatMap(({ event, predicted }): Knot[] => {
    const place = places.get(predicted);
    return place === undefined ? [] : [{ ...extremeOf(event), plain: place }];
  });
  const anchors: Knot[] = [];
  for (const knot of paired) {
    const before = anchors.at(-1);
    if (before === undefined || mayFollow(before, knot)) anchors.push(knot);
  }
  if (anchors.length === 0) return { knots: [], plain };
  const shiftOf = shiftsBetween(anchors, plain);
  const inserted = (fromPlace: number, toPlace: number): Knot[] =>
    plain.slice(fromPlace, toPlace).map((extreme, step) => {
      const { laterMs, higherM } = shiftOf(extreme.at);
      return {
        at: extreme.at + Math.round(laterMs),
        kind: extreme.kind,
        heightM: extreme.heightM + higherM,
        plain: fromPlace + step,
      };
    });
  const anchoredAt = new Set(anchors.map(({ at }) => at));
  const unpaired = events.filter(({ at }) => !anchoredAt.has(at));
  const knots: Knot[] = [];
  anchors.forEach((anchor, place) => {
    const before = anchors[place - 1];
    const fromAt = before?.at ?? -Infinity;
    const own = unpaired.filter(({ at }) => at > fromAt && at < anchor.at).map(extremeOf);
    const fromPlace = before === undefined ? 0 : placeOf(before) + 1;
    const predicted = inserted(fromPlace, placeOf(anchor));
    knots.push(...between(before, own, predicted, anchor), anchor);
  });
  const end = anchors.at(-1);
  if (end !== undefined) {
    const own = unpaired.filter(({ at }) => at > end.at).map(extremeOf);
    knots.push(...between(end, own, inserted(placeOf(end) + 1, plain.length), undefined));
  }
  return { knots: withOneUnmovedAside(knots, plain), plain };
}

/** Past the first that is not moved the curve is the plain one. */
function withOneUnmovedAside(knots: readonly Knot[], plain: readonly TideExtreme[]): Knot[] {
  const isMoved = ({ plain: place, at, heightM }: Knot): boolean => {
    const extreme = place === null ? undefined : plain[place];
    return extreme?.at !== at || extreme.heightM !== heightM;
  };
  return knots.slice(Math.max(0, knots.findIndex(isMoved) - 1), knots.findLastIndex(isMoved) + 2);
}

function extremeOf({ at, kind, heightM }: TideExtreme): Knot {
  return { at, kind, heightM, plain: null };
}

function placeOf(anchor: Knot): number {
  if (anchor.plain === null) throw new RangeError('An anchor is a predicted tide');
  return anchor.plain;
}

/** Two events of a table can stand in one curve: of one kind only with a turn between them. */
function mayFollow(first: Knot, second: Knot): boolean {
  return first.kind === second.kind ? second.at > first.at : follows(first, second);
}

function follows(first: TideExtreme, second: TideExtreme): boolean {
  const rise = second.heightM - first.heightM;
  return (
    second.at > first.at &&
    second.kind !== first.kind &&
    (second.kind === 'high' ? rise > 0 : rise < 0)
  );
}

/**
 * What stands between two anchors: the table's own events where they take turns with them; else the
 * predicted ones, without those that would be turned round.
 */
function between(
  before: Knot | undefined,
  own: readonly Knot[],
  predicted: readonly Knot[],
  after: Knot | undefined,
): Knot[] {
  if (before !== undefined && after !== undefined && own.length > 0) {
    const chain = [before, ...own, after];
    const isChain = chain.every((knot, place) => {
      const previous = chain[place - 1];
      return previous === undefined || follows(previous, knot);
    });
    if (isChain) return [...own];
  }
  const kept = withoutTurnedRound(before, predicted, after);
  if (before === undefined || after === undefined) return kept;
  const [small, other] = kept;
  if (kept.length === 2 && small !== undefined && other !== undefined) {
    const isSmall = Math.abs(small.heightM - other.heightM) <= SMALL_PAIR_M;
    if (isSmall && follows(before, after)) return [];
  }
  const [only] = kept;
  return kept.length === 1 && only !== undefined ? [heldBetween(before, only, after)] : kept;
}

/** Takes out neighbours in pairs, which leaves the turns of high and low as they are. */
function withoutTurnedRound(
  before: Knot | undefined,
  predicted: readonly Knot[],
  after: Knot | undefined,
): Knot[] {
  const kept = [...predicted];
  const ends = (place: number): Knot | undefined =>
    place < 0 ? before : place >= kept.length ? after : kept[place];
  for (let place = 0; place <= kept.length; place += 1) {
    const left = ends(place - 1);
    const right = ends(place);
    if (left === undefined || right === undefined || follows(left, right)) continue;
    if (kept.length < 2) break;
    const from = Math.min(Math.max(0, place - 1), kept.length - 2);
    kept.splice(from, 2);
    place = Math.max(-1, from - 2);
  }
  return kept;
}

/** The one turn between two of the other kind, moved in between them where it is not. */
function heldBetween(before: Knot, only: Knot, after: Knot): Knot {
  const isBetween = only.at > before.at && only.at < after.at;
  const heights = [before.heightM, after.heightM];
  const heightM =
    only.kind === 'low'
      ? Math.min(only.heightM, Math.min(...heights) - CLEARANCE_M)
      : Math.max(only.heightM, Math.max(...heights) + CLEARANCE_M);
  return { ...only, heightM, at: isBetween ? only.at : Math.round((before.at + after.at) / 2) };
}

/** The shift of a predicted extreme: its neighbours', each for two days, and fading to none. */
function shiftsBetween(
  anchors: readonly Knot[],
  plain: readonly TideExtreme[],
): (at: Instant) => Omit<Shift, 'at'> {
  const shifts = anchors.flatMap((anchor): Shift[] => {
    const extreme = plain[placeOf(anchor)];
    if (extreme === undefined) return [];
    const laterMs = anchor.at - extreme.at;
    return [{ at: extreme.at, laterMs, higherM: anchor.heightM - extreme.heightM }];
  });
  return (at) => {
    const next = shifts.findIndex((shift) => shift.at > at);
    const beside = [next < 0 ? shifts.at(-1) : shifts[next - 1], shifts[next]];
    const weights = beside.map((shift) =>
      shift === undefined ? 0 : Math.max(0, 1 - Math.abs(shift.at - at) / HAND_OVER_MS),
    );
    const whole = Math.max(1, (weights[0] ?? 0) + (weights[1] ?? 0));
    const sum = (part: 'laterMs' | 'higherM'): number =>
      beside.reduce((so, shift, place) => {
        return so + ((weights[place] ?? 0) / whole) * (shift?.[part] ?? 0);
      }, 0);
    return { laterMs: sum('laterMs'), higherM: sum('higherM') };
  };
}
