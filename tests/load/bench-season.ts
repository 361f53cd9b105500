import { createTidePredictor } from '@neaps/tide-predictor';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import { planDates } from '#shared/domain/seasons/season-plan.ts';
import type { SeasonPlan } from '#shared/domain/seasons/season-plan.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import { usableDaysInYear } from '#shared/domain/tides/shore-water.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';

const stationId = 'ticon/north_shields-nsh-gbr-bodc';
const runs = 9;
const fromAt = Date.UTC(2027, 0, 1);
const toAt = Date.UTC(2028, 0, 1);

const shore: ShoreRules = {
  zone: 'Europe/London',
  latitude: 55.06,
  longitude: -1.18,
  workingLevelM: 2,
  cutOffLevelM: 3.1,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '19:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
};

const saturdays: SeasonPlan = {
  pattern: { kind: 'weekly', everyWeeks: 1, weekdays: [6] },
  fromOn: '2027-05-01',
  toOn: '2027-10-23',
  windowRules: {
    planLevelM: null,
    earliestClock: null,
    latestClock: null,
    minutesBeforeLow: null,
    minutesAfterLow: null,
    daylightMarginMinutes: null,
    minimumMinutes: null,
  },
  exceptions: [],
  closures: [],
};

/**
 * A year's windows of one shore and the preview of 26 Saturdays, as ratios to this project's
 * extremes of the year and to those of a general-purpose predictor, all in one run. Medians of nine
 * runs, each with a curve of its own, so that nothing is remembered from the run before.
 */
export async function benchSeason(): Promise<void> {
  const found = await tideStations().find(stationId);
  if (!found.isGranted) throw new Error(`${stationId} cannot be used`);
  const newCurve = () => {
    const curve = tideCurve(found.value);
    if (!curve.isGranted) throw new Error(`${stationId} cannot be predicted`);
    return curve.value;
  };
  const other = found.value.constituents.map(({ name, amplitudeM, phaseDeg }) => ({
    name,
    amplitude: amplitudeM,
    phase: phaseDeg,
  }));
  const works = {
    extremes: () => newCurve().extremes(fromAt, toAt).length,
    predictor: () =>
      createTidePredictor(other).getExtremesPrediction({
        start: new Date(fromAt),
        end: new Date(toAt),
      }).length,
    windows: () => usableDaysInYear(shore, newCurve(), '2027-01-01').length,
    saturdays: () => {
      const dates = planDates(saturdays, shore, newCurve());
      return dates.isGranted ? dates.value.length : 0;
    },
  };
  const medians = new Map<string, number>();
  for (const [name, work] of Object.entries(works)) {
    const times: number[] = [];
    let answer = 0;
    for (let run = 0; run < runs; run += 1) {
      const from = performance.now();
      answer = work();
      times.push(performance.now() - from);
    }
    const median = times.sort((a, b) => a - b)[Math.floor(runs / 2)] ?? NaN;
    medians.set(name, median);
    process.stdout.write(`${name.padEnd(10)} ${median.toFixed(1).padStart(8)} ms  ${answer}\n`);
  }
  const ratio = (one: string, to: string): string =>
    ((medians.get(one) ?? NaN) / (medians.get(to) ?? NaN)).toFixed(2);
  process.stdout.write(
    [
      '',
      `year of extremes to the other predictor   ${ratio('extremes', 'predictor')}`,
      `year of windows to the other predictor    ${ratio('windows', 'predictor')}`,
      `year of windows to the year of extremes   ${ratio('windows', 'extremes')}`,
      `Saturday preview to the year of extremes  ${ratio('saturdays', 'extremes')}`,
      '',
    ].join('\n'),
  );
}
