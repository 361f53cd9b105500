import type { Instant } from '#shared/kernel/time.ts';
import { fromIso } from '#shared/kernel/time.ts';

/** The height of the water at one moment, in metres above the datum of its source. */
export interface WaterPoint {
  readonly at: Instant;
  readonly heightM: number;
}

/** The vertical axis of a shore's drawings, in metres. */
export interface WaterAxis {
  readonly bottomM: number;
  readonly topM: number;
}

/** The part of a page that a curve is drawn into. Lengths in pixels, y downwards. */
export interface Plot {
  readonly fromAt: Instant;
  readonly untilAt: Instant;
  readonly widthPx: number;
  /** The y of the axis' top and bottom. */
  readonly topPx: number;
  readonly basePx: number;
  readonly axis: WaterAxis;
}

/** A curve read from points whose moments are written in ISO 8601, in the order of time. */
export function readCurve(points: readonly { at: string; heightM: number }[]): WaterPoint[] {
  return points.map(({ at, heightM }) => ({ at: fromIso(at), heightM }));
}

/**
 * The height at a moment, straight between the two points around it; null outside the curve,
 * since nothing is known there.
 */
export function heightAt(curve: readonly WaterPoint[], at: Instant): number | null {
  let low = 0;
  let high = curve.length - 1;
  const first = curve[low];
  const last = curve[high];
  if (first === undefined || last === undefined || at < first.at || at > last.at) return null;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (pointAt(curve, middle).at <= at) low = middle;
    else high = middle;
  }
  const before = pointAt(curve, low);
  const after = pointAt(curve, high);
  if (after.at === before.at) return before.heightM;
  const share = (at - before.at) / (after.at - before.at);
  return before.heightM + (after.heightM - before.heightM) * share;
}

/** The points of a curve between two moments, both ends interpolated; empty outside the curve. */
export function cutCurve(
  curve: readonly WaterPoint[],
  fromAt: Instant,
  untilAt: Instant,
): WaterPoint[] {
  const ends = [fromAt, untilAt].flatMap((at) => {
    const heightM = heightAt(curve, at);
    return heightM === null ? [] : [{ at, heightM }];
  });
  const inside = curve.filter(({ at }) => at > fromAt && at < untilAt);
  return [...ends, ...inside].sort((a, b) => a.at - b.at);
}

/** The x of a moment and the y of a height in a plot, in pixels to one decimal. */
export function xOf(plot: Plot, at: Instant): number {
  return tenth(((at - plot.fromAt) / (plot.untilAt - plot.fromAt)) * plot.widthPx);
}

export function yOf(plot: Plot, heightM: number): number {
  const { bottomM, topM } = plot.axis;
  return tenth(plot.topPx + ((topM - heightM) / (topM - bottomM)) * (plot.basePx - plot.topPx));
}

/** The water's line in a plot, as the `d` of a path; empty where the curve says nothing. */
export function linePath(plot: Plot, curve: readonly WaterPoint[]): string {
  const points = cutCurve(curve, plot.fromAt, plot.untilAt);
  if (points.length < 2) return '';
  return `M${points.map(({ at, heightM }) => `${xOf(plot, at)} ${yOf(plot, heightM)}`).join('L')}`;
}

/** The water under the line, down to `floorPx`. */
export function waterPath(plot: Plot, curve: readonly WaterPoint[], floorPx: number): string {
  const points = cutCurve(curve, plot.fromAt, plot.untilAt);
  const first = points[0];
  const last = points[points.length - 1];
  if (first === undefined || last === undefined) return '';
  return `${linePath(plot, points)}L${xOf(plot, last.at)} ${floorPx}L${xOf(plot, first.at)} ${floorPx}Z`;
}

/** The shore laid bare between two moments: from the water up to `ceilingPx`. */
export function sandPath(
  plot: Plot,
  curve: readonly WaterPoint[],
  fromAt: Instant,
  untilAt: Instant,
  ceilingPx: number,
): string {
  const points = cutCurve(curve, fromAt, untilAt);
  const first = points[0];
  const last = points[points.length - 1];
  if (first === undefined || last === undefined) return '';
  const along = points.map(({ at, heightM }) => `${xOf(plot, at)} ${yOf(plot, heightM)}`);
  return `M${xOf(plot, first.at)} ${ceilingPx}L${along.join('L')}L${xOf(plot, last.at)} ${ceilingPx}Z`;
}

function pointAt(curve: readonly WaterPoint[], index: number): WaterPoint {
  const point = curve[index];
  if (point === undefined) throw new RangeError(`The curve has no point ${index}`);
  return point;
}

function tenth(value: number): number {
  return Math.round(value * 10) / 10;
}
