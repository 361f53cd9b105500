import type { Instant } from '#shared/kernel/time.ts';
import { lunarOrbitAt, meanLongitudesAt, ratesPerHourAt } from './astronomy.ts';
import type { LunarOrbit, MeanLongitudes } from './astronomy.ts';

/** A part of the tide with one speed of its own. */
export interface Constituent {
  /** The name by which it stands in the table of this file, in capitals. */
  readonly name: string;
  /** Multiples of T, s, h, p and p1, and a constant in degrees: the equilibrium argument V. */
  readonly argument: Argument;
  /** The same multiples for the speed; they differ for M1 alone. */
  readonly speedMultiples: Argument;
  /** Which node factor and phase it takes, and to which power; several for a compound. */
  readonly nodes: readonly NodePower[];
}

/** The node factor f, and the phase u in degrees that goes with it. */
export interface NodeFactor {
  readonly f: number;
  readonly u: number;
}

type Argument = readonly [
  hourAngle: number,
  moon: number,
  sun: number,
  lunarPerigee: number,
  solarPerigee: number,
  constantDeg: number,
];
type Node = 'MM' | 'MF' | 'O1' | 'K1' | 'J1' | 'OO1' | 'M1' | 'M2' | 'K2' | 'L2' | 'M3';
type NodePower = readonly [node: Node, power: number];
type Part = readonly [name: string, times: number];

const RADIAN = Math.PI / 180;

// NOAA Special Publication 98, table 2: the argument, and whose node factor it takes.
const SIMPLE: Readonly<Record<string, readonly [...Argument, Node | null]>> = {
  SA: [0, 0, 1, 0, 0, 0, null],
  SSA: [0, 0, 2, 0, 0, 0, null],
  MM: [0, 1, 0, -1, 0, 0, 'MM'],
  MF: [0, 2, 0, 0, 0, 0, 'MF'],
  MTM: [0, 3, 0, -1, 0, 0, 'MF'],
  MSQM: [0, 4, -2, 0, 0, 0, 'MF'],
  '2Q1': [1, -4, 1, 2, 0, 90, 'O1'],
  SIGMA1: [1, -4, 3, 0, 0, 90, 'O1'],
  Q1: [1, -3, 1, 1, 0, 90, 'O1'],
  RHO1: [1, -3, 3, -1, 0, 90, 'O1'],
  O1: [1, -2, 1, 0, 0, 90, 'O1'],
  M1: [1, -1, 1, 0, 0, -90, 'M1'],
  P1: [1, 0, -1, 0, 0, 90, null],
  S1: [1, 0, 0, 0, 0, 0, null],
  K1: [1, 0, 1, 0, 0, -90, 'K1'],
  J1: [1, 1, 1, -1, 0, -90, 'J1'],
  OO1: [1, 2, 1, 0, 0, -90, 'OO1'],
  EPSILON2: [2, -5, 4, 1, 0, 0, 'M2'],
  '2N2': [2, -4, 2, 2, 0, 0, 'M2'],
  MU2: [2, -4, 4, 0, 0, 0, 'M2'],
  N2: [2, -3, 2, 1, 0, 0, 'M2'],
  NU2: [2, -3, 4, -1, 0, 0, 'M2'],
  // The yearly change of M2; M2's factor by note f of the IHO list of standard constituents.
  MA2: [2, -2, 1, 0, 0, 0, 'M2'],
  M2: [2, -2, 2, 0, 0, 0, 'M2'],
  MB2: [2, -2, 3, 0, 0, 0, 'M2'],
  LAMBDA2: [2, -1, 0, 1, 0, 180, 'M2'],
  L2: [2, -1, 2, -1, 0, 180, 'L2'],
  T2: [2, 0, -1, 0, 1, 0, null],
  S2: [2, 0, 0, 0, 0, 0, null],
  R2: [2, 0, 1, 0, -1, 180, null],
  K2: [2, 0, 2, 0, 0, 0, 'K2'],
  M3: [3, -3, 3, 0, 0, 0, 'M3'],
  S3: [3, 0, 0, 0, 0, 0, null],
  // Four lines that occur in TICON-4 alone, by their Doodson numbers 245555, 265555, 381555 and
  // 383555 with no constant phase counted from midnight, hence 180 where T enters an odd number
  // of times. 3N2 and 3L2 come of the third power of the moon's parallax.
  '3N2': [2, -3, 2, 0, 0, 0, null],
  '3L2': [2, -1, 2, 0, 0, 0, null],
  T3: [3, 0, -1, 0, 0, 180, null],
  R3: [3, 0, 1, 0, 0, 180, 'K1'],
};

// Shallow-water constituents from their parts: IHO list of standard constituents, annex B.
const COMPOUND: Readonly<Record<string, readonly Part[]>> = {
  MSF: [
    ['S2', 1],
    ['M2', -1],
  ],
  '2SM2': [
    ['S2', 2],
    ['M2', -1],
  ],
  MKS2: [
    ['M2', 1],
    ['K2', 1],
    ['S2', -1],
  ],
  MK3: [
    ['M2', 1],
    ['K1', 1],
  ],
  '2MK3': [
    ['M2', 2],
    ['K1', -1],
  ],
  N4: [['N2', 2]],
  MN4: [
    ['M2', 1],
    ['N2', 1],
  ],
  M4: [['M2', 2]],
  MS4: [
    ['M2', 1],
    ['S2', 1],
  ],
  S4: [['S2', 2]],
  '2MO5': [
    ['M2', 2],
    ['O1', 1],
  ],
  '2MK5': [
    ['M2', 2],
    ['K1', 1],
  ],
  M6: [['M2', 3]],
  '2MS6': [
    ['M2', 2],
    ['S2', 1],
  ],
  S6: [['S2', 3]],
  M8: [['M2', 4]],
};

// M1's phase u = xi - nu + Q follows the perigee, and is taken once for the year, as the argument's
// is; its published speed of 14.4966939 degrees an hour holds the perigee's motion too.
const M1_SPEED: Argument = [1, -1, 1, 1, 0, 0];

const ALIASES: Readonly<Record<string, string>> = {
  LAM2: 'LAMBDA2',
  LDA2: 'LAMBDA2',
  RHO: 'RHO1',
  SGM: 'SIGMA1',
  EP2: 'EPSILON2',
  EPS2: 'EPSILON2',
};

const known = new Map<string, Constituent>();
for (const [name, row] of Object.entries(SIMPLE)) known.set(name, simple(name, row));
for (const [name, parts] of Object.entries(COMPOUND)) known.set(name, compound(name, parts));

/**
 * The constituent of that name, in small letters or capitals; undefined for a name that is not one
 * of the 37 of NOAA or the further ones of this file. LAM2, RHO, SGM and EP2 are understood too.
 */
export function constituentNamed(name: string): Constituent | undefined {
  const capitals = name.toUpperCase();
  return known.get(ALIASES[capitals] ?? capitals);
}

/** Degrees an hour of mean solar time at an instant; it moves by less than 0.0000001 in a century. */
export function speedDegPerHour(constituent: Constituent, at: Instant): number {
  return combine(constituent.speedMultiples, ratesPerHourAt(at));
}

/** The equilibrium argument V in degrees from 0 up to 360 at an instant, without the node phase u. */
export function equilibriumArgumentDeg(constituent: Constituent, at: Instant): number {
  const degrees = combine(constituent.argument, meanLongitudesAt(at)) + constituent.argument[5];
  return degrees - 360 * Math.floor(degrees / 360);
}

/**
 * Node factor and node phase at an instant, a product and a sum over the parts of a compound.
 * Source: NOAA Special Publication 98, formulas 73 to 80, 149, 197, 206 to 207, 214 to 215, 227, 235.
 */
export function nodeFactorAt(constituent: Constituent, at: Instant): NodeFactor {
  const orbit = lunarOrbitAt(at);
  let f = 1;
  let u = 0;
  for (const [node, power] of constituent.nodes) {
    const one = nodeFactor(node, orbit);
    f *= one.f ** Math.abs(power);
    u += one.u * power;
  }
  return { f, u };
}

function simple(name: string, row: readonly [...Argument, Node | null]): Constituent {
  const [hourAngle, moon, sun, lunarPerigee, solarPerigee, constantDeg, node] = row;
  const argument: Argument = [hourAngle, moon, sun, lunarPerigee, solarPerigee, constantDeg];
  return {
    name,
    argument,
    speedMultiples: name === 'M1' ? M1_SPEED : argument,
    nodes: node === null ? [] : [[node, 1]],
  };
}

function compound(name: string, parts: readonly Part[]): Constituent {
  const argument: [number, number, number, number, number, number] = [0, 0, 0, 0, 0, 0];
  const nodes: NodePower[] = [];
  for (const [partName, times] of parts) {
    const part = known.get(partName);
    if (part === undefined) throw new RangeError(`${name} has an unknown part ${partName}`);
    part.argument.forEach((multiple, place) => {
      argument[place] = (argument[place] ?? 0) + multiple * times;
    });
    for (const [node, power] of part.nodes) nodes.push([node, power * times]);
  }
  return { name, argument, speedMultiples: argument, nodes };
}

function combine(argument: Argument, angles: MeanLongitudes): number {
  return (
    argument[0] * angles.hourAngle +
    argument[1] * angles.moon +
    argument[2] * angles.sun +
    argument[3] * angles.lunarPerigee +
    argument[4] * angles.solarPerigee
  );
}

function nodeFactor(node: Node, orbit: LunarOrbit): NodeFactor {
  const { I, xi, nu, nuK1, twoNuK2, P } = orbit;
  const sinI = Math.sin(I * RADIAN);
  const sin2I = Math.sin(2 * I * RADIAN);
  const cosHalf = Math.cos((I * RADIAN) / 2);
  const sinHalf = Math.sin((I * RADIAN) / 2);
  const m2: NodeFactor = { f: cosHalf ** 4 / 0.9154, u: 2 * xi - 2 * nu };
  const o1: NodeFactor = { f: (sinI * cosHalf ** 2) / 0.38, u: 2 * xi - nu };
  switch (node) {
    case 'MM':
      return { f: (2 / 3 - sinI ** 2) / 0.5021, u: 0 };
    case 'MF':
      return { f: sinI ** 2 / 0.1578, u: -2 * xi };
    case 'O1':
      return o1;
    case 'K1': {
      const cosNu = Math.cos(nu * RADIAN);
      return { f: Math.sqrt(0.8965 * sin2I ** 2 + 0.6001 * sin2I * cosNu + 0.1006), u: -nuK1 };
    }
    case 'J1':
      return { f: sin2I / 0.7214, u: -nu };
    case 'OO1':
      return { f: (sinI * sinHalf ** 2) / 0.0164, u: -2 * xi - nu };
    case 'M1':
      return m1NodeFactor(o1.f, orbit);
    case 'M2':
      return m2;
    case 'K2': {
      const cosTwoNu = Math.cos(2 * nu * RADIAN);
      return {
        f: Math.sqrt(19.0444 * sinI ** 4 + 2.7702 * sinI ** 2 * cosTwoNu + 0.0981),
        u: -twoNuK2,
      };
    }
    case 'L2': {
      const tanHalfSquared = (sinHalf / cosHalf) ** 2;
      const sin2P = Math.sin(2 * P * RADIAN);
      const cos2P = Math.cos(2 * P * RADIAN);
      const R = Math.atan2(sin2P, 1 / (6 * tanHalfSquared) - cos2P) / RADIAN;
      const f = Math.sqrt(1 - 12 * tanHalfSquared * cos2P + 36 * tanHalfSquared ** 2);
      return { f: m2.f * f, u: m2.u - R };
    }
    case 'M3':
      return { f: m2.f ** 1.5, u: 1.5 * m2.u };
  }
}

/** M1, which NOAA Special Publication 98 makes of two lines on either side of 14.492 degrees. */
function m1NodeFactor(fOfO1: number, { I, xi, nu, P }: LunarOrbit): NodeFactor {
  const cosI = Math.cos(I * RADIAN);
  const cosHalfSquared = (1 + cosI) / 2;
  const ratio = (5 * cosI - 1) / (7 * cosI + 1);
  const Q = Math.atan2(ratio * Math.sin(P * RADIAN), Math.cos(P * RADIAN)) / RADIAN;
  const f = Math.sqrt(
    0.25 +
      (1.5 * cosI * Math.cos(2 * P * RADIAN)) / cosHalfSquared +
      (2.25 * cosI ** 2) / cosHalfSquared ** 2,
  );
  return { f: fOfO1 * f, u: xi - nu + Q };
}
