import type { Instant } from '#shared/kernel/time.ts';
import { startOfYearUtc, yearUtcAt } from './calendar-year.ts';
import { equilibriumArgumentDeg, nodeFactorAt, speedDegPerHour } from './constituents.ts';
import type { Constituent } from './constituents.ts';

/** One constituent at one station: half its range, and the Greenwich phase lag G. */
export interface StationWave {
  readonly constituent: Constituent;
  readonly amplitudeM: number;
  readonly phaseDeg: number;
}

/** The tide about mean level and its changes at one instant. */
export interface WaterMotion {
  readonly heightM: number;
  readonly slopeMPerHour: number;
  readonly curvatureMPerHour2: number;
}

/** A sum of waves that can be asked for its value anywhere, and is smooth everywhere. */
export interface HarmonicSum {
  /** The height alone, in half the time. */
  readonly heightAtM: (at: Instant) => number;
  readonly motionAt: (at: Instant) => WaterMotion;
  /** What the third derivative (metres an hour cubed) nowhere exceeds within an hour of then. */
  readonly jerkBoundAt: (at: Instant) => number;
}

/** The waves of one calendar year, ready for use; times count in hours from the year's start. */
interface YearWaves {
  readonly startAt: Instant;
  readonly amplitudesM: Float64Array;
  readonly speedsRadPerHour: Float64Array;
  readonly phasesRad: Float64Array;
  readonly jerkBound: number;
}

const HOUR_MS = 3_600_000;
const RADIAN = Math.PI / 180;

/**
 * How long before and after the turn of the year one year's node factors give way to the next's.
 * The step between them is a few centimetres at most; spread over twelve hours it moves no extreme
 * by as much as a minute, and without it a height would be said twice, or an extreme lost or doubled.
 */
const TURN_OF_YEAR_HOURS = 6;

// The largest first, second and third derivative of the turn below, over a span of length one.
const TURN_SLOPE = 1.875;
const TURN_CURVATURE = 5.7736;
const TURN_JERK = 60;

/**
 * The harmonic sum with node factors held for each calendar year at the year's middle, as NOAA
 * Special Publication 98 holds them, and led over smoothly at the turn of the year (UTC).
 */
export function harmonicSum(waves: readonly StationWave[]): HarmonicSum {
  const years = new Map<number, YearWaves>();
  const turnBounds = new Map<number, number>();
  const wavesOf = (year: number): YearWaves => {
    const ready = years.get(year);
    if (ready !== undefined) return ready;
    const made = yearWaves(waves, year);
    years.set(year, made);
    return made;
  };
  const turnBound = (year: number): number => {
    const ready = turnBounds.get(year);
    if (ready !== undefined) return ready;
    const made = turnJerkBound(wavesOf(year - 1), wavesOf(year));
    turnBounds.set(year, made);
    return made;
  };
  const heightAtM = (at: Instant): number =>
    turnYear(at) === null ? heightOf(wavesOf(yearUtcAt(at)), at) : motionAt(at).heightM;
  const motionAt = (at: Instant): WaterMotion => {
    const year = turnYear(at);
    if (year === null) return motionOf(wavesOf(yearUtcAt(at)), at);
    return blend(
      motionOf(wavesOf(year - 1), at),
      motionOf(wavesOf(year), at),
      (at - startOfYearUtc(year)) / HOUR_MS,
    );
  };
  const jerkBoundAt = (at: Instant): number => {
    const year = turnYear(at - HOUR_MS) ?? turnYear(at + HOUR_MS);
    return year === null ? wavesOf(yearUtcAt(at)).jerkBound : turnBound(year);
  };
  return { heightAtM, motionAt, jerkBoundAt };
}

/** The year whose beginning lies within reach of the instant, or null. */
function turnYear(at: Instant): number | null {
  const reachMs = TURN_OF_YEAR_HOURS * HOUR_MS;
  const year = yearUtcAt(at + reachMs);
  return at < startOfYearUtc(year) + reachMs ? year : null;
}

function yearWaves(waves: readonly StationWave[], year: number): YearWaves {
  const startAt = startOfYearUtc(year);
  const middleAt = (startAt + startOfYearUtc(year + 1)) / 2;
  const amplitudesM = new Float64Array(waves.length);
  const speedsRadPerHour = new Float64Array(waves.length);
  const phasesRad = new Float64Array(waves.length);
  let jerkBound = 0;
  waves.forEach(({ constituent, amplitudeM, phaseDeg }, place) => {
    const { f, u } = nodeFactorAt(constituent, middleAt);
    const speed = speedDegPerHour(constituent, middleAt) * RADIAN;
    amplitudesM[place] = f * amplitudeM;
    speedsRadPerHour[place] = speed;
    phasesRad[place] = (equilibriumArgumentDeg(constituent, startAt) + u - phaseDeg) * RADIAN;
    jerkBound += Math.abs(f * amplitudeM) * speed ** 3;
  });
  return { startAt, amplitudesM, speedsRadPerHour, phasesRad, jerkBound };
}

function heightOf(waves: YearWaves, at: Instant): number {
  const hours = (at - waves.startAt) / HOUR_MS;
  let heightM = 0;
  for (let place = 0; place < waves.amplitudesM.length; place += 1) {
    const speed = waves.speedsRadPerHour[place] as number;
    const angle = speed * hours + (waves.phasesRad[place] as number);
    heightM += (waves.amplitudesM[place] as number) * Math.cos(angle);
  }
  return heightM;
}

function motionOf(waves: YearWaves, at: Instant): WaterMotion {
  const hours = (at - waves.startAt) / HOUR_MS;
  let heightM = 0;
  let slopeMPerHour = 0;
  let curvatureMPerHour2 = 0;
  for (let place = 0; place < waves.amplitudesM.length; place += 1) {
    const speed = waves.speedsRadPerHour[place] as number;
    const amplitude = waves.amplitudesM[place] as number;
    const angle = speed * hours + (waves.phasesRad[place] as number);
    const cosine = amplitude * Math.cos(angle);
    heightM += cosine;
    slopeMPerHour -= speed * amplitude * Math.sin(angle);
    curvatureMPerHour2 -= speed * speed * cosine;
  }
  return { heightM, slopeMPerHour, curvatureMPerHour2 };
}

/** From the old year's motion to the new one's, hours counted from the turn of the year. */
function blend(from: WaterMotion, to: WaterMotion, hours: number): WaterMotion {
  const length = 2 * TURN_OF_YEAR_HOURS;
  const x = (hours + TURN_OF_YEAR_HOURS) / length;
  const turn = x ** 3 * (10 - 15 * x + 6 * x ** 2);
  const turnSlope = (30 * x ** 2 * (1 - x) ** 2) / length;
  const turnCurvature = (60 * x * (1 - x) * (1 - 2 * x)) / length ** 2;
  const height = to.heightM - from.heightM;
  const slope = to.slopeMPerHour - from.slopeMPerHour;
  const curvature = to.curvatureMPerHour2 - from.curvatureMPerHour2;
  return {
    heightM: from.heightM + turn * height,
    slopeMPerHour: from.slopeMPerHour + turn * slope + turnSlope * height,
    curvatureMPerHour2:
      from.curvatureMPerHour2 + turn * curvature + 2 * turnSlope * slope + turnCurvature * height,
  };
}

function turnJerkBound(from: YearWaves, to: YearWaves): number {
  const length = 2 * TURN_OF_YEAR_HOURS;
  const turnHours = (to.startAt - from.startAt) / HOUR_MS;
  let bound = Math.max(from.jerkBound, to.jerkBound);
  for (let place = 0; place < to.amplitudesM.length; place += 1) {
    const speed = to.speedsRadPerHour[place] as number;
    const before = from.amplitudesM[place] as number;
    const after = to.amplitudesM[place] as number;
    const angle =
      (from.speedsRadPerHour[place] as number) * turnHours +
      (from.phasesRad[place] as number) -
      (to.phasesRad[place] as number);
    const step = Math.hypot(after - before * Math.cos(angle), before * Math.sin(angle));
    bound +=
      step *
      (speed ** 3 +
        (3 * TURN_SLOPE * speed ** 2) / length +
        (3 * TURN_CURVATURE * speed) / length ** 2 +
        TURN_JERK / length ** 3);
  }
  return bound;
}
