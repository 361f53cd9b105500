import type { Instant } from '#shared/kernel/time.ts';
import type { Plot, WaterAxis, WaterPoint } from './water-curve.ts';
import { heightAt, linePath, sandPath, waterPath, xOf, yOf } from './water-curve.ts';

/** The water of one day in a stack of days. Moments outside it are not drawn. */
export interface SeasonStripProps {
  readonly curve: readonly WaterPoint[];
  readonly axis: WaterAxis;
  readonly fromAt: Instant;
  readonly untilAt: Instant;
  readonly widthPx: number;
  readonly sunriseAt: Instant | null;
  readonly sunsetAt: Instant | null;
  /** When the sand is open, with its post for the lower shore; null on a day that is skipped. */
  readonly sand: {
    readonly fromAt: Instant;
    readonly clearByAt: Instant;
    readonly offByAt: Instant;
  } | null;
  /** Dashed down the strip: the earliest and latest. */
  readonly limits: readonly Instant[];
  /** What it says aloud. */
  readonly label: string;
}

const HEIGHT_PX = 38;
const INSET_PX = 3;

/** A strip of a season: a day's water, its dark ends, and the window in sand with its two posts. */
export function SeasonStrip(props: SeasonStripProps) {
  const { curve, axis, fromAt, untilAt, widthPx, sand, limits, label } = props;
  const plot: Plot = {
    fromAt,
    untilAt,
    widthPx,
    topPx: INSET_PX,
    basePx: HEIGHT_PX - INSET_PX,
    axis,
  };
  const isSkipped = sand === null;
  const isShown = (at: Instant): boolean => at > fromAt && at < untilAt;
  return (
    <svg
      className="block max-w-none flex-none"
      viewBox={`0 0 ${widthPx} ${HEIGHT_PX}`}
      width={widthPx}
      height={HEIGHT_PX}
      role="img"
      aria-label={label}
    >
      <path
        className={`fill-shallow ${isSkipped ? 'opacity-60' : ''}`}
        d={waterPath(plot, curve, HEIGHT_PX)}
      />
      <Dark plot={plot} fromAt={fromAt} untilAt={props.sunriseAt} />
      <Dark plot={plot} fromAt={props.sunsetAt} untilAt={untilAt} />
      {sand !== null && (
        <>
          <path className="fill-sand" d={sandPath(plot, curve, sand.fromAt, sand.offByAt, 0)} />
          <Upright plot={plot} curve={curve} at={sand.fromAt} look="edge" />
        </>
      )}
      <path
        className={`fill-none ${isSkipped ? 'stroke-edge' : 'stroke-deep'}`}
        strokeWidth={isSkipped ? 1.25 : 1.75}
        strokeLinejoin="round"
        d={linePath(plot, curve)}
      />
      {limits.filter(isShown).map((at) => (
        <path
          key={at}
          className="stroke-edge"
          strokeWidth="1"
          strokeDasharray="3 3"
          d={`M${xOf(plot, at)} 0V${HEIGHT_PX}`}
        />
      ))}
      {sand !== null && (
        <>
          <Upright plot={plot} curve={curve} at={sand.clearByAt} look="thin" />
          <Upright plot={plot} curve={curve} at={sand.offByAt} look="post" />
        </>
      )}
    </svg>
  );
}

/** Hours without daylight; nothing where the sun does not rise or set. */
function Dark(props: {
  readonly plot: Plot;
  readonly fromAt: Instant | null;
  readonly untilAt: Instant | null;
}) {
  const { plot, fromAt, untilAt } = props;
  if (fromAt === null || untilAt === null) return null;
  const x1 = Math.max(0, xOf(plot, fromAt));
  const x2 = Math.min(plot.widthPx, xOf(plot, untilAt));
  if (x2 <= x1) return null;
  return (
    <rect className="fill-barnacle opacity-15" x={x1} y="0" width={x2 - x1} height={HEIGHT_PX} />
  );
}

const looks = {
  edge: { className: 'stroke-sand-edge', widthPx: 1.25 },
  thin: { className: 'stroke-ink', widthPx: 1 },
  post: { className: 'stroke-ink', widthPx: 1.75 },
} as const;

function Upright(props: {
  readonly plot: Plot;
  readonly curve: readonly WaterPoint[];
  readonly at: Instant;
  readonly look: keyof typeof looks;
}) {
  const { plot, curve, at, look } = props;
  const heightM = heightAt(curve, at);
  if (heightM === null) return null;
  const x = xOf(plot, at);
  const y = yOf(plot, heightM);
  return (
    <>
      <path
        className={looks[look].className}
        strokeWidth={looks[look].widthPx}
        d={`M${x} 0V${y}`}
      />
      {look === 'post' && <circle className="fill-ink" cx={x} cy={y} r="2.6" />}
    </>
  );
}
