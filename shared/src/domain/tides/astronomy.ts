import type { Instant } from '#shared/kernel/time.ts';

/** Mean longitudes in degrees, not reduced to a circle, and the hour angle of the mean sun. */
export interface MeanLongitudes {
  /** T: hour angle of the mean sun at Greenwich; 180 at midnight UTC. */
  readonly hourAngle: number;
  /** s: the moon. */
  readonly moon: number;
  /** h: the sun. */
  readonly sun: number;
  /** p: the moon's perigee. */
  readonly lunarPerigee: number;
  /** p1: the sun's perigee. */
  readonly solarPerigee: number;
  /** N: the moon's ascending node. */
  readonly node: number;
}

/** Angles in degrees that follow from the moon's node and perigee; named as in the publication. */
export interface LunarOrbit {
  /** Inclination of the moon's orbit to the earth's equator. */
  readonly I: number;
  readonly xi: number;
  readonly nu: number;
  /** nu': for K1. */
  readonly nuK1: number;
  /** 2nu'': for K2. */
  readonly twoNuK2: number;
  /** P: the moon's perigee counted from the intersection of its orbit with the equator. */
  readonly P: number;
}

const RADIAN = Math.PI / 180;
const DAY_MS = 86_400_000;
const CENTURY_DAYS = 36_525;

// Greenwich mean noon, 31 December 1899, from which the polynomials below count.
const EPOCH_AT: Instant = -25_567.5 * DAY_MS;

// Degrees, and degrees per Julian century to the powers 1, 2 and 3.
const MOON = [270.437422, 1336 * 360 + 307.892, 0.002525, 0.00000189] as const;
const SUN = [279.696678, 36_000.76892, 0.0003025, 0] as const;
const LUNAR_PERIGEE = [334.328019, 11 * 360 + 109.032206, -0.010344, -0.0000125] as const;
const SOLAR_PERIGEE = [281.220833, 1.719175, 0.000453, 0.00000333] as const;
const NODE = [259.182533, -5 * 360 - 134.142397, 0.002106, 0.00000222] as const;

// Inclination of the ecliptic to the equator at 1900, and of the moon's orbit to the ecliptic.
const OMEGA = 23.452;
const MOON_TO_ECLIPTIC = 5.145;

/** Mean longitudes at an instant. Source: NOAA Special Publication 98, table 1. */
export function meanLongitudesAt(at: Instant): MeanLongitudes {
  const centuries = (at - EPOCH_AT) / (CENTURY_DAYS * DAY_MS);
  return {
    hourAngle: 180 + 360 * (at / DAY_MS - Math.floor(at / DAY_MS)),
    moon: polynomial(MOON, centuries),
    sun: polynomial(SUN, centuries),
    lunarPerigee: polynomial(LUNAR_PERIGEE, centuries),
    solarPerigee: polynomial(SOLAR_PERIGEE, centuries),
    node: polynomial(NODE, centuries),
  };
}

/** How fast the mean longitudes move at an instant, in degrees an hour of mean solar time. */
export function ratesPerHourAt(at: Instant): MeanLongitudes {
  const centuries = (at - EPOCH_AT) / (CENTURY_DAYS * DAY_MS);
  const rate = (terms: readonly [number, number, number, number]) =>
    (terms[1] + 2 * terms[2] * centuries + 3 * terms[3] * centuries ** 2) / (CENTURY_DAYS * 24);
  return {
    hourAngle: 15,
    moon: rate(MOON),
    sun: rate(SUN),
    lunarPerigee: rate(LUNAR_PERIGEE),
    solarPerigee: rate(SOLAR_PERIGEE),
    node: rate(NODE),
  };
}

/**
 * The angles on which node factors and their phases rest, at an instant.
 * Source: NOAA Special Publication 98, paragraphs 22 to 24 (I, nu, xi), 134 (nu') and 138 (nu'').
 */
export function lunarOrbitAt(at: Instant): LunarOrbit {
  const { node, lunarPerigee } = meanLongitudesAt(at);
  const sum = arcTangent(halfAngleRatio(Math.cos), node);
  const difference = arcTangent(halfAngleRatio(Math.sin), node);
  const turns = Math.round(node / 360) * 360;
  const nu = sum - difference;
  const xi = node - turns - sum - difference;
  const I =
    Math.acos(
      cosine(MOON_TO_ECLIPTIC) * cosine(OMEGA) -
        sine(MOON_TO_ECLIPTIC) * sine(OMEGA) * cosine(node),
    ) / RADIAN;
  const nuK1 = Math.atan2(sine(2 * I) * sine(nu), sine(2 * I) * cosine(nu) + 0.3347) / RADIAN;
  const twoNuK2 =
    Math.atan2(sine(I) ** 2 * sine(2 * nu), sine(I) ** 2 * cosine(2 * nu) + 0.0727) / RADIAN;
  return { I, xi, nu, nuK1, twoNuK2, P: lunarPerigee - xi };
}

/** cos or sin of half the difference of the two inclinations, over that of half their sum. */
function halfAngleRatio(of: (radians: number) => number): number {
  const half = RADIAN / 2;
  return of((OMEGA - MOON_TO_ECLIPTIC) * half) / of((OMEGA + MOON_TO_ECLIPTIC) * half);
}

/** Degrees whose tangent is the ratio times the tangent of half the node's longitude. */
function arcTangent(ratio: number, nodeDeg: number): number {
  const half = (nodeDeg - Math.round(nodeDeg / 360) * 360) / 2;
  return Math.atan2(ratio * sine(half), cosine(half)) / RADIAN;
}

function polynomial(terms: readonly [number, number, number, number], x: number): number {
  return terms[0] + x * (terms[1] + x * (terms[2] + x * terms[3]));
}

function sine(degrees: number): number {
  return Math.sin(degrees * RADIAN);
}

function cosine(degrees: number): number {
  return Math.cos(degrees * RADIAN);
}
