/** The sizes that words in a drawing are set in. */
export type LabelSize = 'axis' | 'post' | 'off' | 'low';

/** Words at a place of a drawing; y is the line that they stand on. */
export interface Label {
  readonly parts: readonly { readonly text: string; readonly isStrong: boolean }[];
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly size: LabelSize;
}

/** The room that words take, y downwards. */
export interface Box {
  readonly x1: number;
  readonly x2: number;
  readonly y1: number;
  readonly y2: number;
}

const SIZE_PX: Record<LabelSize, number> = { axis: 13, post: 15, off: 16, low: 24 };
/** Room for a letter as a share of the size: the widest mean of the words that are set here. */
const LETTER = { plain: 0.55, strong: 0.55 };
const ASCENT = 0.78;
const DESCENT = 0.24;

/** The width that words may take at most, in pixels. */
export function labelWidthPx(parts: Label['parts'], size: LabelSize, scale: number): number {
  return parts.reduce(
    (sum, { text, isStrong }) =>
      sum + text.length * SIZE_PX[size] * scale * (isStrong ? LETTER.strong : LETTER.plain),
    0,
  );
}

/** The room that a label takes. */
export function boxOf(label: Label, scale: number): Box {
  const widthPx = labelWidthPx(label.parts, label.size, scale);
  const share = { start: 0, middle: 0.5, end: 1 }[label.anchor];
  const sizePx = SIZE_PX[label.size] * scale;
  const x1 = label.x - widthPx * share;
  return {
    x1,
    x2: x1 + widthPx,
    y1: label.y - sizePx * ASCENT,
    y2: label.y + sizePx * DESCENT,
  };
}

/** Whether two boxes meet, or come nearer than `apartPx` from side to side. */
export function meet(a: Box, b: Box, apartPx: number): boolean {
  return a.x1 < b.x2 + apartPx && b.x1 < a.x2 + apartPx && a.y1 < b.y2 && b.y1 < a.y2;
}
