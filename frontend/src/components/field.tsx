import { SelectArrow } from './select-arrow.tsx';
import type { ReactNode } from 'react';
import { useId } from 'react';

/** What every field is given: its label, what stands in it as text, and what is wrong with it. */
export interface FieldProps {
  readonly label: string;
  /** As it is typed; whoever reads it decides what it means. */
  readonly value: string;
  readonly onChange: (value: string) => void;
  /** A sentence on what is wrong; null or left out where nothing is. */
  readonly error?: string | null | undefined;
  /** What helps to fill it in, under the label. */
  readonly hint?: string;
  /** It shows its value and takes no other; it keeps its place in the order of Tab. */
  readonly isReadOnly?: boolean;
}

const box = 'w-full rounded-md bg-paper px-3 py-1 text-ui text-ink max-wide:text-md';
const fixed = 'read-only:bg-wash read-only:text-barnacle';
const oneLine = `${box} min-h-9 max-wide:min-h-target`;

/** The frame of a control: wrong ones are told by colour, weight, words and to speech. */
function frame(error: FieldProps['error']): string {
  return error == null ? 'border-[1.5px] border-edge' : 'border-2 border-anemone';
}

/** Text on one line. */
export function TextField(props: FieldProps & { readonly placeholder?: string }) {
  return <LineField {...props} type="text" />;
}

/**
 * A number with its unit inside the frame at the right: '1.3' m, '2:00' h. It is text to the
 * browser, so that nothing typed is lost and no wheel changes it.
 */
export function NumberField(
  props: FieldProps & { readonly unit?: string; readonly keys?: 'numeric' | 'decimal' | 'text' },
) {
  return <LineField {...props} type="text" keys={props.keys ?? 'decimal'} />;
}

/** A calendar day, 'YYYY-MM-DD'; empty while it is not whole. */
export function DateField(
  props: FieldProps & { readonly min?: string | undefined; readonly max?: string | undefined },
) {
  return <LineField {...props} type="date" />;
}

/** A time on the clock, 'HH:MM'; empty while it is not whole. */
export function TimeField(props: FieldProps) {
  return <LineField {...props} type="time" />;
}

function LineField(
  props: FieldProps & {
    readonly type: 'text' | 'date' | 'time';
    readonly placeholder?: string;
    readonly unit?: string;
    readonly keys?: 'numeric' | 'decimal' | 'text';
    readonly min?: string | undefined;
    readonly max?: string | undefined;
  },
) {
  const { unit, keys } = props;
  const unitId = useId();
  return (
    <Labelled field={props} alsoDescribedBy={unit === undefined ? null : unitId}>
      {(aria) => (
        <span className="relative block">
          <input
            {...aria}
            className={`${oneLine} ${fixed} tabular-nums ${frame(props.error)} ${unit === undefined ? '' : 'pr-8'}`}
            type={props.type}
            inputMode={keys}
            autoComplete="off"
            placeholder={props.placeholder}
            min={props.min}
            max={props.max}
            value={props.value}
            readOnly={props.isReadOnly}
            onChange={(event) => props.onChange(event.target.value)}
          />
          {unit !== undefined && (
            <span
              id={unitId}
              className="pointer-events-none absolute top-1/2 right-3 -translate-y-1/2 text-ui text-barnacle"
            >
              {unit}
            </span>
          )}
        </span>
      )}
    </Labelled>
  );
}

/** Text on several lines. */
export function TextArea(props: FieldProps & { readonly rows?: number }) {
  return (
    <Labelled field={props} alsoDescribedBy={null}>
      {(aria) => (
        <textarea
          {...aria}
          className={`${box} ${fixed} block ${frame(props.error)}`}
          rows={props.rows ?? 3}
          value={props.value}
          readOnly={props.isReadOnly}
          onChange={(event) => props.onChange(event.target.value)}
        />
      )}
    </Labelled>
  );
}

/** One of a few, chosen from a list under its label. */
export function ChoiceField(
  props: Omit<FieldProps, 'isReadOnly'> & {
    readonly choices: readonly { readonly value: string; readonly words: string }[];
    readonly isDisabled?: boolean;
  },
) {
  return (
    <Labelled field={props} alsoDescribedBy={null}>
      {(aria) => (
        <span className="relative block">
          <select
            {...aria}
            className={`${oneLine} appearance-none truncate pr-8 disabled:bg-wash disabled:text-barnacle disabled:opacity-100 ${frame(props.error)}`}
            value={props.value}
            disabled={props.isDisabled}
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
      )}
    </Labelled>
  );
}

interface Aria {
  readonly id: string;
  readonly 'aria-invalid': true | undefined;
  readonly 'aria-describedby': string | undefined;
}

/** The label above, the hint under it, the control, and below it what is wrong. */
function Labelled(props: {
  readonly field: Pick<FieldProps, 'label' | 'hint' | 'error'>;
  readonly alsoDescribedBy: string | null;
  readonly children: (aria: Aria) => ReactNode;
}) {
  const { label, hint, error } = props.field;
  const id = useId();
  const hintId = `${id}-hint`;
  const errorId = `${id}-error`;
  const describedBy = [
    ...(props.alsoDescribedBy === null ? [] : [props.alsoDescribedBy]),
    ...(hint === undefined ? [] : [hintId]),
    ...(error == null ? [] : [errorId]),
  ].join(' ');
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="mb-0.5 block text-sm font-medium">
        {label}
      </label>
      {hint !== undefined && (
        <p id={hintId} className="mb-1 text-sm text-barnacle">
          {hint}
        </p>
      )}
      {props.children({
        id,
        'aria-invalid': error == null ? undefined : true,
        'aria-describedby': describedBy === '' ? undefined : describedBy,
      })}
      {error != null && (
        <p id={errorId} className="mt-1 text-sm font-medium text-anemone">
          {error}
        </p>
      )}
    </div>
  );
}

/** Fields of one matter under a heading; a hair divides it from the one before. */
export function FieldGroup({
  legend,
  children,
}: {
  readonly legend: string;
  readonly children: ReactNode;
}) {
  return (
    <fieldset className="mt-3.5 grid min-w-0 gap-2.5 border-t border-hair pt-2.5">
      <legend className="float-left w-full text-lg font-semibold">{legend}</legend>
      {children}
    </fieldset>
  );
}
