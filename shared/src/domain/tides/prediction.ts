import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { constituentNamed } from './constituents.ts';
import { curveWithDifferences } from './differences.ts';
import type { TideDifferences } from './differences.ts';
import { harmonicSum } from './harmonic-sum.ts';
import type { StationWave } from './harmonic-sum.ts';
import { heightsAtSteps } from './tide-curve.ts';
import type { TideCurve, TideExtreme } from './tide-curve.ts';
import { turningPoints } from './turning-points.ts';

/** What is needed to predict the tide at a place. */
export interface TideStation {
  readonly id: string;
  readonly constituents: readonly StationConstituent[];
  /** Height of mean sea level above chart datum. */
  readonly meanLevelM: number;
  /** Where the constituents are those of another station, how this one differs from it. */
  readonly differences?: TideDifferences;
}

/** One line of a station's harmonic constants. */
export interface StationConstituent {
  readonly name: string;
  /** Half the range of this part of the tide. */
  readonly amplitudeM: number;
  /** Greenwich phase lag G, in degrees and for times in UTC. */
  readonly phaseDeg: number;
}

/** Why no tide can be predicted from a station's figures. */
export type CurveRefusal =
  | { readonly why: 'unknown-constituent'; readonly name: string }
  | { readonly why: 'unusable-figure'; readonly name: string };

/**
 * The tide curve of a station by the harmonic method of NOAA Special Publication 98, node factors
 * held for each calendar year; at the turn of the year (UTC) one year's factors give way to the
 * next's within six hours on either side, so that the curve is smooth and highs and lows alternate.
 *
 * Refuses every constituent that it does not know by its name, rather than leave it out, and every
 * figure that is no finite number. The astronomical tide only: no weather, no surge.
 */
export function tideCurve(station: TideStation): Verdict<TideCurve, CurveRefusal> {
  const reasons: CurveRefusal[] = [];
  const waves: StationWave[] = [];
  for (const { name, amplitudeM, phaseDeg } of station.constituents) {
    const constituent = constituentNamed(name);
    if (constituent === undefined) reasons.push({ why: 'unknown-constituent', name });
    else if (!Number.isFinite(amplitudeM) || !Number.isFinite(phaseDeg)) {
      reasons.push({ why: 'unusable-figure', name });
    } else if (amplitudeM !== 0) waves.push({ constituent, amplitudeM, phaseDeg });
  }
  if (!Number.isFinite(station.meanLevelM)) {
    reasons.push({ why: 'unusable-figure', name: 'mean level' });
  }
  const [first, ...rest] = reasons;
  if (first !== undefined) return refused(first, ...rest);
  const curve = harmonicCurve(waves, station.meanLevelM);
  return granted(
    station.differences === undefined ? curve : curveWithDifferences(curve, station.differences),
  );
}

/** Turns are found block by block and kept: a year of days asks for the same ones again and again. */
const BLOCK_MS = 16 * 86_400_000;
const MOST_BLOCKS = 64;

function harmonicCurve(waves: readonly StationWave[], meanLevelM: number): TideCurve {
  const sum = harmonicSum(waves);
  const heightAtM: TideCurve['heightAtM'] = (at) => meanLevelM + sum.heightAtM(at);
  const blocks = new Map<number, readonly TideExtreme[]>();
  const extremesOfBlock = (block: number): readonly TideExtreme[] => {
    const kept = blocks.get(block);
    if (kept !== undefined) return kept;
    const found = turningPoints(sum, block * BLOCK_MS, (block + 1) * BLOCK_MS).map(
      ({ at, kind, heightM }) => ({ at, kind, heightM: meanLevelM + heightM }),
    );
    const oldest = blocks.keys().next().value;
    if (blocks.size >= MOST_BLOCKS && oldest !== undefined) blocks.delete(oldest);
    blocks.set(block, found);
    return found;
  };
  return {
    heightAtM,
    series: (fromAt, toAt, stepMinutes) => heightsAtSteps(heightAtM, fromAt, toAt, stepMinutes),
    extremes: (fromAt, toAt) => {
      const found: TideExtreme[] = [];
      for (let block = Math.floor(fromAt / BLOCK_MS); block * BLOCK_MS < toAt; block += 1) {
        for (const one of extremesOfBlock(block)) {
          if (one.at >= fromAt && one.at < toAt) found.push(one);
        }
      }
      return found;
    },
  };
}
