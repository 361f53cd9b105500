import { useRef, useState } from 'react';
import { Button } from '#frontend/components/button.tsx';
import { TideCredit } from '#frontend/components/tide-credit.tsx';
import { shortDate } from '#frontend/words/day-words.ts';
import type { PlanDate, PlanPreview } from '#shared/contracts/season-plans.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { AddDate } from './add-date.tsx';
import { DateList } from './date-list.tsx';
import type { PlanException } from './plan-draft.ts';
import { decided, decisionFor } from './plan-exceptions.ts';
import { planHeadline } from './plan-words.ts';
import { ReasonForm } from './reason-form.tsx';
import type { StripHours } from './strip-hours.ts';

/** The dates of a plan in the making, each to be skipped or taken by hand. */
export function DecidedDates(props: {
  readonly preview: PlanPreview;
  readonly hours: StripHours;
  /** Whether the rules beside them have moved on to something that gives no dates. */
  readonly isOutdated: boolean;
  readonly exceptions: readonly PlanException[];
  readonly onDecide: (exceptions: PlanException[]) => void;
}) {
  const { preview, exceptions, onDecide } = props;
  const [openedOn, setOpenedOn] = useState<CalendarDay | null>(null);
  const buttons = useRef(new Map<CalendarDay, HTMLButtonElement>());
  const close = (): void => {
    if (openedOn !== null) buttons.current.get(openedOn)?.focus();
    setOpenedOn(null);
  };
  const decide = (on: CalendarDay, kind: PlanException['kind'] | null, reason: string): void => {
    onDecide(decided(exceptions, on, kind, reason));
    if (on === openedOn) close();
  };
  const endOf = (date: PlanDate) => {
    const decision = decisionFor(date);
    if (decision === null) return null;
    return (
      <Button
        ref={(node) => {
          if (node === null) buttons.current.delete(date.on);
          else buttons.current.set(date.on, node);
        }}
        look="plain"
        onPress={() => (decision.kind === null ? decide(date.on, null, '') : setOpenedOn(date.on))}
      >
        {decision.word} <span className="sr-only">{shortDate(date.on)}</span>
      </Button>
    );
  };
  const underOf = (date: PlanDate) => {
    const decision = decisionFor(date);
    if (openedOn !== date.on || decision === null || decision.kind === null) return null;
    const { kind, word } = decision;
    return (
      <ReasonForm
        confirmWords={`${word} ${shortDate(date.on)}`}
        onConfirm={(reason) => decide(date.on, kind, reason)}
        onClose={close}
      />
    );
  };
  return (
    <section aria-labelledby="dates">
      <h2 id="dates" aria-live="polite">
        {planHeadline(preview)}
      </h2>
      <p className="text-sm text-barnacle max-wide:hidden">
        Each strip is one day’s water. Dark ends are hours without daylight; dashed lines are your
        earliest and latest.
      </p>
      {props.isOutdated && (
        <p className="text-sm font-medium text-wrack">
          These are the dates from before: what is marked in the rules gives none.
        </p>
      )}
      <DateList
        preview={preview}
        hours={props.hours}
        endRoom="word"
        endOf={endOf}
        underOf={underOf}
      />
      <div className="mt-2">
        <AddDate dates={preview.dates} onAdd={(on, reason) => decide(on, 'add', reason)} />
      </div>
      <div className="mt-4">
        <TideCredit shown="The water of these days" source={preview.source} />
      </div>
    </section>
  );
}
