/** A box to tick with its words. */
export function Tick(props: {
  readonly words: string;
  /** More words that are spoken and not shown: which of many boxes it is. */
  readonly spoken?: string;
  readonly isTicked: boolean;
  readonly onChange: (isTicked: boolean) => void;
}) {
  return (
    <label className="inline-flex min-h-7 cursor-pointer items-center gap-2 text-sm whitespace-nowrap max-wide:min-h-target max-wide:text-ui">
      <span className="relative grid size-5 flex-none place-items-center">
        <input
          type="checkbox"
          className="peer absolute inset-0 m-0 cursor-pointer appearance-none rounded-sm border-[1.5px] border-edge bg-paper checked:border-deep checked:bg-deep"
          checked={props.isTicked}
          onChange={(event) => props.onChange(event.target.checked)}
        />
        <svg
          className="pointer-events-none relative hidden fill-none stroke-on-deep peer-checked:block"
          viewBox="0 0 12 10"
          width="12"
          height="10"
          aria-hidden
        >
          <path strokeWidth="2" d="M1 5L4.5 8.5L11 1.5" />
        </svg>
      </span>
      <span>
        {props.words}{' '}
        {props.spoken !== undefined && <span className="sr-only">{props.spoken}</span>}
      </span>
    </label>
  );
}
