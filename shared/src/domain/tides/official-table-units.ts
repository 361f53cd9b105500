import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { METRES } from './official-table-reading.ts';
import type { HeightUnit, TableLayout, TableRefusal } from './official-table-reading.ts';
import type { Token } from './official-table-tokens.ts';

export type Figure = Extract<Token, { shape: 'figure' }>;

/** In which units the heights of a table stand. */
export interface UnitReading {
  /** The unit of each height of an event. */
  readonly units: readonly HeightUnit[];
  /** Which of them is taken; the other, if any, is held against it. */
  readonly taken: number;
  readonly from: TableLayout['unitsFrom'];
}

type Refusal = Extract<TableRefusal, { why: 'units-unclear' | 'columns-unclear' }>;

const UNITS: readonly HeightUnit[] = ['m', 'cm', 'ft'];

/** In metres: no tide on earth has a higher high water above the datum of its tables. */
export const HIGHEST_M = 18;
export const LOWEST_M = -4;

const UNIT_WORD = /(?<![a-z])(?<unit>cm|centimet(?:re|er)s?|m|met(?:re|er)s?|ft|feet)(?![a-z])/gi;

/**
 * The units that were given, or that the table names over its columns, behind its figures or in the
 * lines above; two heights for each event tell theirs by their ratio. Else by size: no tide is above
 * 18 m, so that higher figures are feet, or centimetres if above 60; whole numbers of a smaller size
 * could be any of them, and are refused. Others are taken to be metres.
 */
export function unitReading(
  heights: readonly (readonly Figure[])[],
  heading: string | null,
  above: readonly string[],
  given: HeightUnit | undefined,
): Verdict<UnitReading, Refusal> {
  if (heights[0]?.length === 2) return ofTwo(heights, given);
  const one = (unit: HeightUnit, from: TableLayout['unitsFrom']): Verdict<UnitReading, Refusal> =>
    granted({ units: [unit], taken: 0, from });
  if (given !== undefined) return one(given, 'given');
  const figures = heights.flat();
  const line = above.find((text) => /\bunits?\b/i.test(text)) ?? '';
  const behind = figures.flatMap(({ unit }) => (unit === null ? [] : [unit]));
  for (const named of [behind, unitsNamed(heading ?? ''), unitsNamed(line)]) {
    const different = [...new Set(named)];
    if (different.length > 1) return refused({ why: 'units-unclear' });
    if (different[0] !== undefined) return one(different[0], 'table');
  }
  const sizes = figures.map(({ value }) => Math.abs(value)).sort((a, b) => a - b);
  const large = sizes[Math.floor(sizes.length * 0.95)] ?? 0;
  const isWhole = figures.every(({ decimals }) => decimals === 0);
  if (large > 60) return one('cm', 'sizes');
  if (isWhole) return refused({ why: 'units-unclear' });
  return one(large > HIGHEST_M ? 'ft' : 'm', 'sizes');
}

function unitsNamed(text: string): HeightUnit[] {
  return [...text.matchAll(UNIT_WORD)].map(({ 0: word }) => {
    const first = word.toLowerCase().charAt(0);
    return first === 'f' ? 'ft' : first === 'c' ? 'cm' : 'm';
  });
}

/** The two units in which nine events of ten agree. */
function ofTwo(
  heights: readonly (readonly Figure[])[],
  given: HeightUnit | undefined,
): Verdict<UnitReading, Refusal> {
  let best: readonly HeightUnit[] | null = null;
  let most = heights.length * 0.9;
  for (const first of UNITS) {
    for (const second of UNITS) {
      const units = [first, second];
      if (first === second) continue;
      const agreeing = heights.filter((pair) => doHeightsAgree(pair, units)).length;
      if (agreeing < most) continue;
      most = agreeing;
      best = units;
    }
  }
  // Heights that agree in no two units are no heights of one tide: one of the columns is no height.
  if (best === null) return refused({ why: 'columns-unclear' });
  const [pair = []] = heights;
  const finest = best.map((unit, place) => stepM(pair[place], unit));
  const byStep = finest.indexOf(Math.min(...finest));
  const asked = given === undefined ? -1 : best.indexOf(given);
  return granted({ units: best, taken: asked < 0 ? byStep : asked, from: 'two-columns' });
}

/** Whether the heights of an event are one and the same, each rounded as it is printed. */
export function doHeightsAgree(figures: readonly Figure[], units: readonly HeightUnit[]): boolean {
  const [first, second] = figures;
  const [unit, other] = units;
  if (first === undefined || second === undefined) return true;
  if (unit === undefined || other === undefined) return true;
  const apartM = Math.abs(first.value * METRES[unit] - second.value * METRES[other]);
  return apartM <= (stepM(first, unit) + stepM(second, other)) / 2 + 1e-9;
}

/** What one more in the last printed place is worth. */
function stepM(figure: Figure | undefined, unit: HeightUnit): number {
  return METRES[unit] / 10 ** (figure?.decimals ?? 0);
}
