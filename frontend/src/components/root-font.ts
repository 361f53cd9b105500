const USUAL_PX = 16;

/** How much larger than usual the reader has set all text: 1 as a rule, 2 at 200 per cent. */
export function textScale(): number {
  const sizePx = Number.parseFloat(getComputedStyle(document.documentElement).fontSize);
  return Number.isFinite(sizePx) ? sizePx / USUAL_PX : 1;
}
