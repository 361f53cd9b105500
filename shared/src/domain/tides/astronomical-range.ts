import { startOfYearUtc } from './calendar-year.ts';
import type { TideCurve } from './tide-curve.ts';

/** The lowest and the highest astronomical tide, in metres above chart datum. */
export interface AstronomicalRange {
  readonly lowestM: number;
  readonly highestM: number;
}

/** The moon's node goes round in 18.6 years; lowest and highest are sought over 19 whole ones. */
const years = 19;

/**
 * The lowest and the highest astronomical tide of a curve: the extremes of 19 calendar years
 * from the one given, in metres above chart datum. Source of the definition: International
 * Hydrographic Organization, resolution 3/1919 as amended (19 years, average weather).
 */
export function astronomicalRange(curve: TideCurve, fromYear: number): AstronomicalRange {
  const heights = curve
    .extremes(startOfYearUtc(fromYear), startOfYearUtc(fromYear + years))
    .map(({ heightM }) => heightM);
  return {
    lowestM: heights.reduce((lowest, heightM) => Math.min(lowest, heightM), Infinity),
    highestM: heights.reduce((highest, heightM) => Math.max(highest, heightM), -Infinity),
  };
}
