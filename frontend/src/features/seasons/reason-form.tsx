import type { ReactNode } from 'react';
import { useEffect, useRef, useState } from 'react';
import { Button } from '#frontend/components/button.tsx';
import { TextField } from '#frontend/components/field.tsx';

/** Asks why, in a line that may be left empty; the focus goes into it when it opens. */
export function ReasonForm(props: {
  readonly confirmWords: string;
  readonly onConfirm: (reason: string) => void;
  readonly onClose: () => void;
  /** What else is asked, before the reason. */
  readonly children?: ReactNode;
}) {
  const [reason, setReason] = useState('');
  const ref = useRef<HTMLFormElement>(null);
  useEffect(() => ref.current?.querySelector('input')?.focus(), []);
  return (
    <form
      ref={ref}
      noValidate
      className="relative z-20 flex flex-wrap items-end gap-3 bg-wash px-3 pt-2 pb-3"
      onSubmit={(event) => {
        event.preventDefault();
        props.onConfirm(reason);
      }}
    >
      {props.children}
      <div className="min-w-0 flex-1 basis-56">
        <TextField label="Reason, may be left empty" value={reason} onChange={setReason} />
      </div>
      <Button onPress={() => props.onConfirm(reason)}>{props.confirmWords}</Button>
      <Button look="line" onPress={props.onClose}>
        Leave it
      </Button>
    </form>
  );
}
