import type { Instant } from '#shared/kernel/time.ts';
import { textScale } from './root-font.ts';
import type { WaterAxis, WaterPoint } from './water-curve.ts';
import { heightAt, linePath, sandPath, waterPath, xOf, yOf } from './water-curve.ts';

interface WaterLineProps {
  readonly curve: readonly WaterPoint[];
  readonly axis: WaterAxis;
  readonly fromAt: Instant;
  readonly untilAt: Instant;
  readonly widthPx: number;
  /** At the usual size of text; larger words over the water take more. */
  readonly heightPx: number;
  /** What it says aloud. */
  readonly label: string;
  /** When the sand is open; its right edge is the post. */
  readonly sand?: { readonly fromAt: Instant; readonly untilAt: Instant };
  /** The words over the low water: its moment, and both parts of the text. */
  readonly caption?: { readonly at: Instant; readonly clock: string; readonly height: string };
  readonly nowAt?: Instant;
}

const CAPTION_PX = 17;
const HALF_CAPTION_PX = 42;

/** The small water line of one day, drawn at the size that it is shown in. */
export function WaterLine(props: WaterLineProps) {
  const { curve, axis, fromAt, untilAt, widthPx, label, sand, caption, nowAt } = props;
  const scale = textScale();
  const captionPx = caption === undefined ? 0 : CAPTION_PX * scale;
  const heightPx = props.heightPx + Math.max(0, captionPx - CAPTION_PX);
  const topPx = caption === undefined ? 3 : captionPx;
  const plot = { fromAt, untilAt, widthPx, topPx, basePx: heightPx - 3, axis };
  const ceilingPx = caption === undefined ? topPx : topPx - 2;
  const nowM = nowAt === undefined ? null : heightAt(curve, nowAt);
  return (
    <svg
      className="block max-w-none flex-none"
      viewBox={`0 0 ${widthPx} ${heightPx}`}
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={label}
    >
      <path className="fill-shallow" d={waterPath(plot, curve, heightPx)} />
      {sand !== undefined && (
        <>
          <path
            className="fill-sand"
            d={sandPath(plot, curve, sand.fromAt, sand.untilAt, ceilingPx)}
          />
          <Upright plot={plot} curve={curve} at={sand.fromAt} fromPx={ceilingPx} look="sand-edge" />
        </>
      )}
      <path
        className="fill-none stroke-deep"
        strokeWidth={props.heightPx < 40 ? 1.5 : 1.75}
        strokeLinejoin="round"
        d={linePath(plot, curve)}
      />
      {sand !== undefined && (
        <Upright plot={plot} curve={curve} at={sand.untilAt} fromPx={ceilingPx} look="post" />
      )}
      {nowAt !== undefined && nowM !== null && (
        <circle
          className="fill-ink stroke-foam"
          strokeWidth="1.5"
          cx={xOf(plot, nowAt)}
          cy={yOf(plot, nowM)}
          r="3.5"
        />
      )}
      {caption !== undefined && (
        <text
          className="fill-ink text-xs font-semibold tabular-nums"
          y={captionPx - 6}
          {...captionPlace(xOf(plot, caption.at), widthPx, HALF_CAPTION_PX * scale)}
        >
          {caption.clock}
          <tspan className="fill-barnacle font-normal"> {caption.height}</tspan>
        </text>
      )}
    </svg>
  );
}

function captionPlace(
  x: number,
  widthPx: number,
  halfPx: number,
): { x: number; textAnchor: 'start' | 'middle' | 'end' } {
  if (x < halfPx) return { x: 0, textAnchor: 'start' };
  if (x > widthPx - halfPx) return { x: widthPx, textAnchor: 'end' };
  return { x, textAnchor: 'middle' };
}

function Upright({
  plot,
  curve,
  at,
  fromPx,
  look,
}: {
  readonly plot: Parameters<typeof xOf>[0];
  readonly curve: readonly WaterPoint[];
  readonly at: Instant;
  readonly fromPx: number;
  readonly look: 'sand-edge' | 'post';
}) {
  const heightM = heightAt(curve, at);
  if (heightM === null) return null;
  const x = xOf(plot, at);
  const y = yOf(plot, heightM);
  if (look === 'sand-edge') {
    return <path className="stroke-sand-edge" strokeWidth="1.25" d={`M${x} ${fromPx}V${y}`} />;
  }
  return (
    <>
      <path className="stroke-ink" strokeWidth="1.75" d={`M${x} ${fromPx}V${y}`} />
      <circle className="fill-ink" cx={x} cy={y} r="2.6" />
    </>
  );
}
