import type { ReactNode } from 'react';
import { useId } from 'react';

/** One of the answers: its words, and under them what helps to tell it from the others. */
export interface RadioChoice {
  readonly value: string;
  readonly words: string;
  readonly detail?: ReactNode;
}

/** One of a few, all of them in view; none is chosen until the reader chooses. */
export function RadioList(props: {
  readonly label: string;
  readonly hint?: string;
  readonly error?: string | null | undefined;
  /** Empty while nothing is chosen. */
  readonly value: string;
  readonly choices: readonly RadioChoice[];
  readonly onChange: (value: string) => void;
}) {
  const { label, hint, error, value, choices, onChange } = props;
  const id = useId();
  const describedBy = [
    ...(hint === undefined ? [] : [`${id}-hint`]),
    ...(error == null ? [] : [`${id}-error`]),
  ].join(' ');
  return (
    <div
      role="radiogroup"
      aria-labelledby={`${id}-label`}
      aria-describedby={describedBy === '' ? undefined : describedBy}
      aria-invalid={error == null ? undefined : true}
      className="min-w-0"
    >
      <p id={`${id}-label`} className="text-sm font-medium">
        {label}
      </p>
      {hint !== undefined && (
        <p id={`${id}-hint`} className="text-sm text-barnacle">
          {hint}
        </p>
      )}
      <ul className="mt-1">
        {choices.map((choice, index) => (
          <li key={choice.value} className="flex gap-2.5 border-hair py-1 [li+&]:border-t">
            <span className="relative mt-0.5 grid size-5 flex-none place-items-center max-wide:mt-2.5">
              <input
                id={`${id}-${index}`}
                type="radio"
                name={id}
                value={choice.value}
                className={`peer absolute inset-0 m-0 cursor-pointer appearance-none rounded-full border-[1.5px] bg-paper checked:border-deep ${error == null ? 'border-edge' : 'border-anemone'}`}
                checked={choice.value === value}
                aria-describedby={choice.detail === undefined ? undefined : `${id}-${index}-more`}
                onChange={() => onChange(choice.value)}
              />
              <span
                aria-hidden
                className="pointer-events-none relative hidden size-2.5 rounded-full bg-deep peer-checked:block"
              />
            </span>
            <div className="min-w-0 flex-1">
              <label
                htmlFor={`${id}-${index}`}
                className="block min-h-7 cursor-pointer py-0.5 text-ui max-wide:min-h-target max-wide:py-2"
              >
                {choice.words}
              </label>
              {choice.detail !== undefined && (
                <div id={`${id}-${index}-more`} className="text-sm text-barnacle">
                  {choice.detail}
                </div>
              )}
            </div>
          </li>
        ))}
      </ul>
      {error != null && (
        <p id={`${id}-error`} className="mt-1 text-sm font-medium text-anemone">
          {error}
        </p>
      )}
    </div>
  );
}
