/** The mark at the right of a closed list, drawn over it; its parent is `relative`. */
export function SelectArrow() {
  return (
    <svg
      className="pointer-events-none absolute top-1/2 right-3 -translate-y-1/2"
      viewBox="0 0 10 5"
      width="10"
      height="5"
      aria-hidden
    >
      <path className="fill-ink" d="M0 0H10L5 5Z" />
    </svg>
  );
}
