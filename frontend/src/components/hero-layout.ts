import type { Instant } from '#shared/kernel/time.ts';
import { clockAt } from '#shared/kernel/time.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import type { Box, Label, LabelSize } from './label-box.ts';
import { boxOf, labelWidthPx, meet } from './label-box.ts';
import type { Plot, WaterAxis, WaterPoint } from './water-curve.ts';
import { cutCurve, heightAt, xOf, yOf } from './water-curve.ts';

/** What the large water line shows of one session's day. */
export interface HeroFacts {
  readonly curve: readonly WaterPoint[];
  readonly axis: WaterAxis;
  readonly dayFromAt: Instant;
  readonly dayUntilAt: Instant;
  readonly zone: string;
  readonly crewMeetsAt: Instant;
  readonly partyMeetsAt: Instant;
  readonly startsAt: Instant;
  readonly lowWaterAt: Instant;
  readonly lowWaterHeightM: number;
  readonly clearByAt: Instant;
  readonly offByAt: Instant;
  readonly sunriseAt: Instant | null;
  readonly sunsetAt: Instant | null;
  readonly isStoodDown: boolean;
}

export type HeroLabelKey =
  | 'off-by'
  | 'clear-by'
  | 'low-water'
  | 'low-height'
  | 'starts'
  | 'party-meets'
  | 'crew-meets'
  | 'sunrise'
  | 'sunset'
  | 'stood-down';

export type HeroLabel = Label & { readonly key: HeroLabelKey };

/** Where everything of the large water line stands, in pixels. */
export interface HeroLayout {
  readonly plot: Plot;
  readonly heightPx: number;
  /** Room for the words of the axis at the left of the plot. */
  readonly leftPx: number;
  readonly isNarrow: boolean;
  /** The y of the top of each post. */
  readonly offPostTopPx: number;
  readonly clearPostTopPx: number;
  readonly labels: readonly HeroLabel[];
  /** What found no place clear of the curve and of the rest, to be said under the drawing. */
  readonly unplaced: readonly HeroLabelKey[];
}

const HOUR_MS = 3_600_000;
const NARROW_PX = 640;
const NARROW_HOURS = 8;
const RISE = 22;
const GAP = 3;

/** Whether a drawing of this width shows a part of the day only. */
export function isNarrowHero(widthPx: number, scale: number): boolean {
  return widthPx < NARROW_PX * scale;
}

/**
 * Places the words of the large water line in a drawing of this width. Each takes the first of
 * its places that lies inside the drawing and clear of the curve, the posts and the words placed
 * before it. `scale` is how much larger than usual text is set; `levelsM` are heights at which lines
 * cross the drawing.
 */
export function layoutHero(
  facts: HeroFacts,
  widthPx: number,
  scale: number,
  levelsM: readonly number[] = [],
): HeroLayout {
  const isNarrow = isNarrowHero(widthPx, scale);
  const leftPx = isNarrow ? 0 : 34 * scale;
  const words = wordsOf(facts);
  const [fromAt, untilAt] = isNarrow ? narrowSpan(facts, widthPx, scale) : wholeDay(facts);
  const flat = { fromAt, untilAt, widthPx: widthPx - leftPx, axis: facts.axis };
  const clearX = xOf({ ...flat, topPx: 0, basePx: 1 }, facts.clearByAt);
  const offX = xOf({ ...flat, topPx: 0, basePx: 1 }, facts.offByAt);
  const isOneRow =
    clearX - 10 - labelWidthPx(words['clear-by'], 'post', scale) >= 0 &&
    offX + 10 + labelWidthPx(words['off-by'], 'off', scale) <= flat.widthPx;
  const topPx = facts.isStoodDown ? 12 : (isOneRow ? 36 : 58) * scale;
  const heightPx = (isNarrow ? 226 : 286) * scale;
  const basePx = heightPx - 24 * scale;
  const plot: Plot = { ...flat, topPx: topPx + 4, basePx: basePx - 4 };
  const offPostTopPx = topPx - (isOneRow ? RISE : 34) * scale;
  const clearPostTopPx = topPx - (isOneRow ? RISE : 16) * scale;
  const frame: Box = { x1: -leftPx, x2: plot.widthPx, y1: 0, y2: basePx };

  const labels: HeroLabel[] = [];
  const unplaced: HeroLabelKey[] = [];
  const fixed = facts.isStoodDown
    ? []
    : [
        upright(plot, facts, facts.clearByAt, clearPostTopPx),
        upright(plot, facts, facts.offByAt, offPostTopPx),
        upright(plot, facts, facts.startsAt, topPx),
        ...levelsM.map((heightM) => across(plot, heightM)),
      ];
  const place: Place = (key, ...places) => {
    const label = places
      .map((at) => ({ key, parts: words[key], ...at }))
      .find((candidate) => {
        const box = boxOf(candidate, scale);
        const taken = [...fixed, ...labels.map((placed) => boxOf(placed, scale))];
        return (
          inside(box, frame) &&
          isClearOfCurve(plot, facts.curve, box) &&
          !taken.some((other) => meet(box, other, GAP))
        );
      });
    if (label === undefined) unplaced.push(key);
    else labels.push(label);
  };

  const startX = xOf(plot, facts.startsAt);
  const lowX = xOf(plot, facts.lowWaterAt);
  const row = (n: number): number => topPx + (16 + 18 * n) * scale;
  if (facts.isStoodDown) {
    const middle = (startX + offX) / 2;
    const anchors = [topPx + 40 * scale, topPx + 20 * scale];
    place(
      'stood-down',
      ...anchors.map((y) => ({ x: middle, y, anchor: 'middle', size: 'post' }) as const),
    );
  } else {
    const offHalf = labelWidthPx(words['off-by'], 'off', scale) / 2;
    if (isOneRow) {
      place('off-by', { x: offX + 10, y: offPostTopPx + 13 * scale, anchor: 'start', size: 'off' });
      place('clear-by', {
        x: clearX - 10,
        y: clearPostTopPx + 13 * scale,
        anchor: 'end',
        size: 'post',
      });
    } else {
      const x = Math.min(Math.max(offX, offHalf), plot.widthPx - offHalf);
      const y = clearPostTopPx + 8 * scale;
      place('off-by', { x, y: offPostTopPx - 7 * scale, anchor: 'middle', size: 'off' });
      place(
        'clear-by',
        { x: clearX - 8, y, anchor: 'end', size: 'post' },
        { x: offX + 8, y, anchor: 'start', size: 'post' },
      );
    }
    placeLowWater(place, plot, facts, words, lowX, offX, scale);
    place(
      'starts',
      { x: startX - 9, y: row(0), anchor: 'end', size: 'axis' },
      {
        x: startX + 6,
        y: row(0),
        anchor: 'start',
        size: 'axis',
        parts: words.starts.slice(0, 1),
      },
    );
    place('party-meets', { x: startX - 9, y: row(1), anchor: 'end', size: 'axis' });
    place('crew-meets', { x: startX - 9, y: row(2), anchor: 'end', size: 'axis' });
  }
  if (!isNarrow) placeSun(place, plot, facts, topPx, basePx, scale);
  return {
    plot,
    heightPx,
    leftPx,
    isNarrow,
    offPostTopPx,
    clearPostTopPx,
    labels,
    unplaced,
  };
}

/** A place for words; words of its own where it has room for fewer. */
type Spot = Omit<Label, 'parts'> & Partial<Pick<Label, 'parts'>>;
type Place = (key: HeroLabelKey, ...places: readonly Spot[]) => void;
type Words = Record<HeroLabelKey, Label['parts']>;

/** The words of each label: plain text, and in bold the clock that matters in it. */
function wordsOf(facts: HeroFacts): Words {
  const clock = (at: Instant): string => clockAt(at, facts.zone);
  const plain = (text: string) => ({ text, isStrong: false });
  const strong = (text: string) => ({ text, isStrong: true });
  return {
    'off-by': [strong(`off the shore by ${clock(facts.offByAt)}`)],
    'clear-by': [plain('lower shore clear by '), strong(clock(facts.clearByAt))],
    'low-water': [strong(clockOfWater(facts.lowWaterAt, facts.zone))],
    'low-height': [plain(`low ${metres(facts.lowWaterHeightM)} m`)],
    starts: [strong(clock(facts.startsAt)), plain(' on the shore')],
    'party-meets': [strong(clock(facts.partyMeetsAt)), plain(' party meets')],
    'crew-meets': [strong(clock(facts.crewMeetsAt)), plain(' crew meet')],
    sunrise: [plain(facts.sunriseAt === null ? '' : `sunrise ${clock(facts.sunriseAt)}`)],
    sunset: [plain(facts.sunsetAt === null ? '' : `sunset ${clock(facts.sunsetAt)}`)],
    'stood-down': [strong('stood down')],
  };
}

function wholeDay(facts: HeroFacts): readonly [Instant, Instant] {
  return [facts.dayFromAt, facts.dayUntilAt];
}

/** Eight hours around the low water, far enough to its left for the words of the first post. */
function narrowSpan(facts: HeroFacts, widthPx: number, scale: number): readonly [Instant, Instant] {
  const wordsPx = labelWidthPx(wordsOf(facts)['clear-by'], 'post', scale) + 10;
  const before = Math.min(6.2, Math.max(4.3, (wordsPx / widthPx) * NARROW_HOURS));
  const latest = facts.dayUntilAt - NARROW_HOURS * HOUR_MS;
  const fromAt = Math.max(facts.dayFromAt, Math.min(latest, facts.clearByAt - before * HOUR_MS));
  return [fromAt, Math.min(facts.dayUntilAt, fromAt + NARROW_HOURS * HOUR_MS)];
}

function placeLowWater(
  place: Place,
  plot: Plot,
  facts: HeroFacts,
  words: Words,
  lowX: number,
  offX: number,
  scale: number,
): void {
  const spanPx = labelWidthPx(words['low-water'], 'low', scale) + GAP;
  const places = (
    [
      { x: lowX - 8, anchor: 'end' },
      { x: offX + 8, anchor: 'start' },
    ] as const
  ).map(({ x, anchor }) => {
    const [x1, x2] = anchor === 'end' ? [x - spanPx, x] : [x, x + spanPx];
    return { x, anchor, y: highestY(plot, facts.curve, x1, x2) - 9 * scale };
  });
  const sized = (size: LabelSize, raisedPx: number): Spot[] =>
    places.map((at) => ({ ...at, y: at.y - raisedPx, size }));
  place('low-water', ...sized('low', 18 * scale));
  place('low-height', ...sized('axis', 0));
}

function placeSun(
  place: Place,
  plot: Plot,
  facts: HeroFacts,
  topPx: number,
  basePx: number,
  scale: number,
): void {
  const low = facts.axis.bottomM < 0 ? yOf(plot, 0) - 6 : basePx - 9;
  const rows = [low, topPx + 15 * scale];
  const at = (x: number, anchor: 'start' | 'end') =>
    rows.map((y) => ({ x, y, anchor, size: 'axis' }) as const);
  if (facts.sunriseAt !== null) place('sunrise', ...at(xOf(plot, facts.sunriseAt) - 6, 'end'));
  if (facts.sunsetAt !== null) place('sunset', ...at(xOf(plot, facts.sunsetAt) + 6, 'start'));
}

/** The y of the highest water between two x. */
function highestY(plot: Plot, curve: readonly WaterPoint[], x1: number, x2: number): number {
  const heights = between(plot, curve, x1, x2).map(({ heightM }) => heightM);
  return heights.length === 0 ? plot.basePx : yOf(plot, Math.max(...heights));
}

function isClearOfCurve(plot: Plot, curve: readonly WaterPoint[], box: Box): boolean {
  const ys = between(plot, curve, box.x1, box.x2).map(({ heightM }) => yOf(plot, heightM));
  return ys.every((y) => y > box.y2 + GAP) || ys.every((y) => y < box.y1 - GAP);
}

function between(plot: Plot, curve: readonly WaterPoint[], x1: number, x2: number): WaterPoint[] {
  const at = (x: number): Instant =>
    plot.fromAt +
    (Math.min(Math.max(x, 0), plot.widthPx) / plot.widthPx) * (plot.untilAt - plot.fromAt);
  return cutCurve(curve, at(x1), at(x2));
}

function upright(plot: Plot, facts: HeroFacts, at: Instant, fromPx: number): Box {
  const x = xOf(plot, at);
  const heightM = heightAt(facts.curve, at);
  return {
    x1: x - 1,
    x2: x + 1,
    y1: fromPx,
    y2: heightM === null ? plot.basePx : yOf(plot, heightM),
  };
}

function across(plot: Plot, heightM: number): Box {
  const y = yOf(plot, heightM);
  return { x1: 0, x2: plot.widthPx, y1: y - 1, y2: y + 1 };
}

function inside(box: Box, frame: Box): boolean {
  return box.x1 >= frame.x1 && box.x2 <= frame.x2 && box.y1 >= frame.y1 && box.y2 <= frame.y2;
}
