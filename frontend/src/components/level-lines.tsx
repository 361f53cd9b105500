import { metres } from '#frontend/words/tide-words.ts';
import { labelWidthPx } from './label-box.ts';
import type { Plot } from './water-curve.ts';
import { yOf } from './water-curve.ts';

/** A height that a shore is judged by, with its name. */
export interface WaterLevel {
  readonly name: string;
  readonly heightM: number;
}

const LINE_PX = 17;
const GAP_PX = 8;

/** The room that the words of the levels take at the right of the plot, in pixels. */
export function levelsWidthPx(
  levels: readonly WaterLevel[],
  isNarrow: boolean,
  scale: number,
): number {
  const widths = levels.map((level) =>
    labelWidthPx([{ text: wordsOf(level, isNarrow), isStrong: false }], 'axis', scale),
  );
  return widths.length === 0 ? 0 : Math.ceil(Math.max(...widths)) + GAP_PX;
}

/**
 * Levels as dashed lines over the water, each with its words right of the plot; on a narrow one
 * only their heights, since the names stand beside the drawing there.
 */
export function LevelLines(props: {
  readonly plot: Plot;
  readonly levels: readonly WaterLevel[];
  readonly isNarrow: boolean;
  readonly scale: number;
}) {
  const { plot, levels, isNarrow, scale } = props;
  const fromTop = [...levels].sort((a, b) => b.heightM - a.heightM);
  const wordsY = apart(
    fromTop.map(({ heightM }) => yOf(plot, heightM) + 4.5),
    LINE_PX * scale,
  );
  return fromTop.map((level, index) => (
    <g key={level.name}>
      <path
        className="fill-none stroke-ink"
        strokeWidth="1.25"
        strokeDasharray="6 4"
        d={`M0 ${yOf(plot, level.heightM)}H${plot.widthPx}`}
      />
      <text className="fill-ink text-xs tabular-nums" x={plot.widthPx + GAP_PX} y={wordsY[index]}>
        {wordsOf(level, isNarrow)}
      </text>
    </g>
  ));
}

function wordsOf({ name, heightM }: WaterLevel, isNarrow: boolean): string {
  return isNarrow ? metres(heightM) : `${name} ${metres(heightM)} m`;
}

/** Places from top to bottom with at least so much between them: the lower ones give way. */
function apart(ys: readonly number[], leastPx: number): number[] {
  const placed: number[] = [];
  for (const y of ys) {
    const above = placed.at(-1);
    placed.push(above === undefined ? y : Math.max(y, above + leastPx));
  }
  return placed;
}
