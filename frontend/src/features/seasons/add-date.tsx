import { useEffect, useRef, useState } from 'react';
import { Button } from '#frontend/components/button.tsx';
import { DateField } from '#frontend/components/field.tsx';
import type { PlanDate } from '#shared/contracts/season-plans.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { isCalendarDay } from '#shared/kernel/time.ts';
import { ReasonForm } from './reason-form.tsx';

/** Adds a date off the pattern; it opens from a quiet button. */
export function AddDate(props: {
  readonly dates: readonly PlanDate[];
  readonly onAdd: (on: CalendarDay, reason: string) => void;
}) {
  const [isOpen, setIsOpen] = useState(false);
  const button = useRef<HTMLButtonElement>(null);
  const wasOpen = useRef(false);
  useEffect(() => {
    if (!isOpen && wasOpen.current) button.current?.focus();
    wasOpen.current = isOpen;
  }, [isOpen]);
  if (!isOpen) {
    return (
      <Button ref={button} look="plain" onPress={() => setIsOpen(true)}>
        Add a date
      </Button>
    );
  }
  return (
    <Opened
      dates={props.dates}
      onAdd={(on, reason) => {
        props.onAdd(on, reason);
        setIsOpen(false);
      }}
      onClose={() => setIsOpen(false)}
    />
  );
}

function Opened(props: {
  readonly dates: readonly PlanDate[];
  readonly onAdd: (on: CalendarDay, reason: string) => void;
  readonly onClose: () => void;
}) {
  const [on, setOn] = useState('');
  const [error, setError] = useState<string | null>(null);
  const add = (reason: string): void => {
    if (!isCalendarDay(on)) setError('Choose a day.');
    else if (props.dates.some((date) => date.on === on)) {
      setError('The plan has this day already.');
    } else props.onAdd(on, reason);
  };
  return (
    <ReasonForm confirmWords="Add it" onConfirm={add} onClose={props.onClose}>
      <div className="basis-44">
        <DateField
          label="Date to add"
          value={on}
          error={error}
          onChange={(value) => {
            setOn(value);
            setError(null);
          }}
        />
      </div>
    </ReasonForm>
  );
}
