/** What a slot looks like on the rock: a shell, the scar of one, a shell tilted off, or the reader's. */
export type LimpetLook = 'claimed' | 'yours' | 'gap' | 'in-doubt';

const SHELL = 'M1.7 9.9C2.5 7.5 5 3.5 6.9 2.1Q7.9 1.4 8.8 2.4C10.4 4.2 11.8 7.4 12.3 9.9Z';
const RIBS = 'M6.9 4.9C6 6.2 5.2 7.6 4.7 8.9M8.2 4.9C8.6 6.2 8.9 7.6 9 8.9';
const RIBS_FROM_PX = 18;

interface LimpetProps {
  readonly look: LimpetLook;
  readonly sizePx?: number;
  /** A claim a moment ago: the shell comes down onto its scar, once. */
  readonly isSettling?: boolean;
  /** A session that is over is drawn in the colour of lines. */
  readonly isPast?: boolean;
}

/**
 * One slot. The rock line (y 10.7 of 15) meets the next limpet's, so that a row stands on one
 * line. Hidden from speech: words always follow it.
 */
export function Limpet({ look, sizePx = 14, isSettling = false, isPast = false }: LimpetProps) {
  const colour =
    look === 'in-doubt'
      ? 'fill-wrack stroke-wrack'
      : isPast
        ? 'fill-edge stroke-edge'
        : 'fill-deep stroke-deep';
  const shell = (
    <>
      <path className={colour} strokeLinejoin="round" d={SHELL} />
      {sizePx >= RIBS_FROM_PX && (
        <path className="fill-none stroke-foam" strokeWidth="0.8" strokeLinecap="round" d={RIBS} />
      )}
    </>
  );
  return (
    <svg
      className="block flex-none overflow-visible"
      data-limpet={look}
      viewBox="0 0 14 15"
      width={sizePx}
      height={(sizePx * 15) / 14}
      aria-hidden
    >
      <path
        className="stroke-edge"
        strokeWidth="1.3"
        d={look === 'gap' ? 'M0 10.7H1.6M12.4 10.7H14' : 'M0 10.7H14'}
      />
      {look === 'gap' && (
        <ellipse
          className="fill-none stroke-anemone"
          strokeWidth="1.6"
          cx="7"
          cy="10.5"
          rx="4.9"
          ry="2.1"
        />
      )}
      {look === 'in-doubt' && <g transform="rotate(-24 1.9 10.1)">{shell}</g>}
      {(look === 'claimed' || look === 'yours') && (
        <g className={isSettling ? 'motion-safe:animate-settle' : undefined}>{shell}</g>
      )}
      {look === 'yours' && <path className="stroke-kelp" strokeWidth="2" d="M1.2 13.7H12.8" />}
    </svg>
  );
}

/** The slots of one session in their order, on one rock line. */
export function LimpetRow({
  looks,
  sizePx,
  isPast = false,
}: {
  readonly looks: readonly LimpetLook[];
  readonly sizePx?: number;
  readonly isPast?: boolean;
}) {
  return (
    <span className="inline-flex flex-none">
      {looks.map((look, index) => (
        <Limpet
          key={index}
          look={look}
          isPast={isPast}
          {...(sizePx === undefined ? {} : { sizePx })}
        />
      ))}
    </span>
  );
}
