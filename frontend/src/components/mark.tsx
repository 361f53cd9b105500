/** A low water filled with sand, and the post on the rising limb, dotted where it meets the water. */
export function Mark({ sizePx = 28 }: { sizePx?: number }) {
  return (
    <svg className="block flex-none" viewBox="0 0 24 24" width={sizePx} height={sizePx} aria-hidden>
      <path className="fill-shallow" d="M0 7.4C3.4 7.4 4 18.4 9 18.4S16.4 8.6 24 8V23H0Z" />
      <path className="fill-sand" d="M1.5 7.6C4.4 9 4.8 18.4 9 18.4S13.4 15.6 16 12.6V7.6Z" />
      <g className="fill-none" strokeWidth="2.1" strokeLinecap="round">
        <path className="stroke-deep" d="M0 7.4C3.4 7.4 4 18.4 9 18.4S16.4 8.6 24 8" />
        <path className="stroke-ink" d="M16 1.2V12.6" />
      </g>
      <circle className="fill-ink" cx="16" cy="12.8" r="2.4" />
    </svg>
  );
}
