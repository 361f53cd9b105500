import { useId } from 'react';

/** Some of a few short words, each pressed or not, in one row that wraps. */
export function ToggleRow<Value extends number>(props: {
  readonly label: string;
  readonly choices: readonly {
    readonly value: Value;
    readonly short: string;
    readonly words: string;
  }[];
  readonly chosen: readonly Value[];
  readonly error?: string | null | undefined;
  readonly onChange: (chosen: readonly Value[]) => void;
}) {
  const { label, choices, chosen, error, onChange } = props;
  const id = useId();
  return (
    <div
      role="group"
      aria-labelledby={`${id}-label`}
      aria-describedby={error == null ? undefined : `${id}-error`}
    >
      <p id={`${id}-label`} className="mb-0.5 text-sm font-medium">
        {label}
      </p>
      <div className="flex flex-wrap gap-1">
        {choices.map(({ value, short, words }) => {
          const isChosen = chosen.includes(value);
          return (
            <button
              key={value}
              type="button"
              aria-pressed={isChosen}
              aria-label={words}
              className={`min-h-9 flex-1 basis-9 rounded-md border-[1.5px] px-1 text-sm max-wide:min-h-target ${
                isChosen
                  ? 'border-deep bg-deep font-semibold text-on-deep'
                  : `${error == null ? 'border-edge' : 'border-anemone'} bg-paper text-ink hover:bg-wash`
              }`}
              onClick={() =>
                onChange(isChosen ? chosen.filter((one) => one !== value) : [...chosen, value])
              }
            >
              {short}
            </button>
          );
        })}
      </div>
      {error != null && (
        <p id={`${id}-error`} className="mt-1 text-sm font-medium text-anemone">
          {error}
        </p>
      )}
    </div>
  );
}
