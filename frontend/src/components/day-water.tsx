import type { Instant } from '#shared/kernel/time.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import type { AxisFacts } from './hero-axes.tsx';
import { HeroAxes } from './hero-axes.tsx';
import { isNarrowHero } from './hero-layout.ts';
import type { WaterLevel } from './level-lines.tsx';
import { LevelLines, levelsWidthPx } from './level-lines.tsx';
import { textScale } from './root-font.ts';
import { useMeasuredWidth } from './use-measured-width.ts';
import type { Plot, WaterPoint } from './water-curve.ts';
import { linePath, waterPath, xOf, yOf } from './water-curve.ts';

/** What is drawn of a day on which nobody goes down the shore. */
export type DayFacts = AxisFacts & {
  readonly curve: readonly WaterPoint[];
  readonly dayUntilAt: Instant;
  /** Its low waters, each with its moment and height in words over the trough. */
  readonly lows: readonly WaterPoint[];
};

const HEIGHT_PX = 286;
const NARROW_HEIGHT_PX = 226;
const AXIS_PX = 34;
const HALF_LOW_PX = 46;
const LOW_LINE_PX = 17;

/** The large water line of a day without a working window, for which no sand is laid bare. */
export function DayWater(props: {
  readonly facts: DayFacts;
  readonly levels: readonly WaterLevel[];
  /** What it says aloud. */
  readonly label: string;
}) {
  const { facts, levels, label } = props;
  const [ref, widthPx] = useMeasuredWidth<HTMLElement>();
  const scale = textScale();
  return (
    <figure ref={ref} className="min-h-56">
      {widthPx !== null && widthPx > 0 && (
        <Drawing facts={facts} levels={levels} label={label} widthPx={widthPx} scale={scale} />
      )}
    </figure>
  );
}

function Drawing(props: {
  readonly facts: DayFacts;
  readonly levels: readonly WaterLevel[];
  readonly label: string;
  readonly widthPx: number;
  readonly scale: number;
}) {
  const { facts, levels, label, widthPx, scale } = props;
  const isNarrow = isNarrowHero(widthPx, scale);
  const rightPx = levelsWidthPx(levels, isNarrow, scale);
  const leftPx = isNarrow ? 0 : AXIS_PX * scale;
  const heightPx = (isNarrow ? NARROW_HEIGHT_PX : HEIGHT_PX) * scale;
  const plot: Plot = {
    fromAt: facts.dayFromAt,
    untilAt: facts.dayUntilAt,
    widthPx: Math.max(1, widthPx - leftPx - rightPx),
    topPx: 40 * scale,
    basePx: heightPx - 24 * scale - 4,
    axis: facts.axis,
  };
  const floorPx = plot.basePx + 4;
  return (
    <svg
      className="block max-w-none"
      viewBox={`${-leftPx} 0 ${widthPx} ${heightPx}`}
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={label}
    >
      <HeroAxes facts={facts} layout={{ plot, heightPx, isNarrow }} />
      <path className="fill-shallow" d={waterPath(plot, facts.curve, floorPx)} />
      {facts.axis.bottomM < 0 && (
        <path
          className="stroke-edge"
          strokeDasharray="2 3"
          d={`M0 ${yOf(plot, 0)}H${plot.widthPx}`}
        />
      )}
      <path
        className="fill-none stroke-deep"
        strokeWidth="2.25"
        strokeLinejoin="round"
        d={linePath(plot, facts.curve)}
      />
      <LevelLines plot={plot} levels={levels} isNarrow={isNarrow} scale={scale} />
      {facts.lows.map((low) => (
        <text
          key={low.at}
          className="fill-ink text-xs tabular-nums"
          x={Math.min(
            Math.max(xOf(plot, low.at), HALF_LOW_PX * scale),
            plot.widthPx - HALF_LOW_PX * scale,
          )}
          y={underTroughPx(plot, low, levels, scale)}
          textAnchor="middle"
        >
          <tspan className="font-semibold">{clockOfWater(low.at, facts.zone)}</tspan>{' '}
          {metres(low.heightM)} m
        </text>
      ))}
      <path className="stroke-edge" strokeWidth="1.25" d={`M0 ${floorPx}H${plot.widthPx}`} />
    </svg>
  );
}

/** Where the words of a low water stand: in the water under it, clear of the dashed lines. */
function underTroughPx(
  plot: Plot,
  low: WaterPoint,
  levels: readonly WaterLevel[],
  scale: number,
): number {
  const linePx = LOW_LINE_PX * scale;
  const troughPx = yOf(plot, low.heightM);
  const isClear = (y: number): boolean =>
    levels.every(({ heightM }) => Math.abs(yOf(plot, heightM) - (y - 4 * scale)) > linePx / 2 + 1);
  const places = [1, 1.5, 2, 2.5, 3].map((lines) => troughPx + lines * linePx);
  return places.find((y) => y < plot.basePx && isClear(y)) ?? troughPx + linePx;
}
