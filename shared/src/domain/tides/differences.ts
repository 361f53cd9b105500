import type { Instant } from '#shared/kernel/time.ts';
import { heightsAtSteps } from './tide-curve.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';

/** How the tide at one place differs from that at another, high and low water apart. */
export interface TideDifferences {
  readonly high: ExtremeDifference;
  readonly low: ExtremeDifference;
}

/** The difference of one kind of extreme: its height is multiplied, then raised. */
export interface ExtremeDifference {
  /** Later than at the other place; earlier if negative. */
  readonly laterMinutes: number;
  readonly heightFactor: number;
  readonly higherM: number;
}

/** An extreme there and the same one here. */
interface Pair {
  readonly there: TideExtreme;
  readonly here: TideExtreme;
}

const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;
const BLOCK_MS = 32 * DAY_MS;

/** Wider than any time difference and several tides, so that blocks agree where they meet. */
const OVERLAP_MS = 4 * DAY_MS;

/**
 * The curve at a place by its differences from another place's curve: each high and low water is
 * moved, and between a pair of neighbours times and heights are mapped in straight proportion onto
 * the other curve, whose shape stays (product rule R9). Extremes alternate as there; a small high
 * and low that the differences would turn round in time or in height are both left out.
 */
export function curveWithDifferences(there: TideCurve, differences: TideDifferences): TideCurve {
  const blocks = new Map<number, readonly Pair[]>();
  const pairsOfBlock = (block: number): readonly Pair[] => {
    const ready = blocks.get(block);
    if (ready !== undefined) return ready;
    const made = inOrder(
      there
        .extremes(block * BLOCK_MS - OVERLAP_MS, (block + 1) * BLOCK_MS + OVERLAP_MS)
        .map((extreme) => ({ there: extreme, here: moved(extreme, differences) })),
    );
    blocks.set(block, made);
    return made;
  };
  const heightAtM = (at: Instant): number =>
    heightBetween(there, pairsOfBlock(Math.floor(at / BLOCK_MS)), at);
  return {
    heightAtM,
    series: (fromAt, toAt, stepMinutes) => heightsAtSteps(heightAtM, fromAt, toAt, stepMinutes),
    extremes: (fromAt, toAt) => {
      const found: TideExtreme[] = [];
      for (let block = Math.floor(fromAt / BLOCK_MS); block * BLOCK_MS < toAt; block += 1) {
        for (const { here } of pairsOfBlock(block)) {
          const isOfBlock = Math.floor(here.at / BLOCK_MS) === block;
          if (isOfBlock && here.at >= fromAt && here.at < toAt) found.push(here);
        }
      }
      return found;
    },
  };
}

function moved(extreme: TideExtreme, differences: TideDifferences): TideExtreme {
  const { laterMinutes, heightFactor, higherM } = differences[extreme.kind];
  return {
    at: extreme.at + Math.round(laterMinutes * MINUTE_MS),
    kind: extreme.kind,
    heightM: extreme.heightM * heightFactor + higherM,
  };
}

/** The pairs that still alternate and follow one another here. */
function inOrder(pairs: readonly Pair[]): Pair[] {
  const kept: Pair[] = [];
  for (const pair of pairs) {
    const last = kept.at(-1);
    if (last !== undefined && !follows(last.here, pair.here)) kept.pop();
    else kept.push(pair);
  }
  return kept;
}

function follows(first: TideExtreme, second: TideExtreme): boolean {
  const rise = second.heightM - first.heightM;
  return second.at > first.at && (second.kind === 'high' ? rise > 0 : rise < 0);
}

function heightBetween(there: TideCurve, pairs: readonly Pair[], at: Instant): number {
  const next = pairs.findIndex(({ here }) => here.at > at);
  const before = pairs[next - 1];
  const after = pairs[next];
  if (before === undefined || after === undefined) {
    throw new RangeError('A tide without highs and lows cannot take differences');
  }
  const share = (at - before.here.at) / (after.here.at - before.here.at);
  const thereAt = before.there.at + share * (after.there.at - before.there.at);
  const rise = after.there.heightM - before.there.heightM;
  const shareOfRise = (there.heightAtM(thereAt) - before.there.heightM) / rise;
  return before.here.heightM + shareOfRise * (after.here.heightM - before.here.heightM);
}
