import { planDates } from '#shared/domain/seasons/season-plan.ts';
import type { PlanDate, SeasonPlan } from '#shared/domain/seasons/season-plan.ts';
import type { PlanWindowRules } from '#shared/domain/seasons/plan-window.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { StationConstituent } from '#shared/domain/tides/prediction.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';

/** A plan that asks nothing beyond its shore. */
export const NOTHING_MORE: PlanWindowRules = {
  planLevelM: null,
  earliestClock: null,
  latestClock: null,
  minutesBeforeLow: null,
  minutesAfterLow: null,
  daylightMarginMinutes: null,
  minimumMinutes: null,
};
/** A shore with the usual times round low water, at 54 N on the meridian of Greenwich. */
export const SHORE: ShoreRules = {
  zone: 'UTC',
  latitude: 54,
  longitude: 0,
  workingLevelM: 1.6,
  cutOffLevelM: 3,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '18:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
};

/** The dates of a plan that can be followed; throws on one that cannot. */
export function datesOf(plan: SeasonPlan, shore: ShoreRules, curve: TideCurve): PlanDate[] {
  const dates = planDates(plan, shore, curve);
  if (!dates.isGranted) throw new Error(JSON.stringify(dates.reasons));
  return dates.value;
}

/** The tide of these constituents about a mean level of 2.5 m. */
export function curveOf(constituents: readonly StationConstituent[]): TideCurve {
  const curve = tideCurve({ id: 'made up', meanLevelM: 2.5, constituents });
  if (!curve.isGranted) throw new Error(JSON.stringify(curve.reasons));
  return curve.value;
}
