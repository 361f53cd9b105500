import { SelectArrow } from './select-arrow.tsx';

/** One of a few, chosen from a list; its name is spoken and not shown. */
export function Select(props: {
  readonly name: string;
  readonly value: string;
  readonly choices: readonly { readonly value: string; readonly words: string }[];
  readonly onChange: (value: string) => void;
}) {
  return (
    <span className="relative inline-flex min-w-30 max-wide:flex-1 wide:min-w-38">
      <select
        aria-label={props.name}
        className="min-h-9 w-full appearance-none truncate rounded-md border-[1.5px] border-edge bg-paper py-1 pr-8 pl-3 text-ui max-wide:min-h-target"
        value={props.value}
        onChange={(event) => props.onChange(event.target.value)}
      >
        {props.choices.map(({ value, words }) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </select>
      <SelectArrow />
    </span>
  );
}
