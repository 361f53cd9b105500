import type { SlotView } from '#shared/contracts/slots.ts';
import { SlotRow } from './slot-row.tsx';
import type { OnSlot } from './use-claim-slot.ts';

/** The crew of a session, slot by slot. */
export function SlotList({ slots, on }: { slots: readonly SlotView[]; on: OnSlot }) {
  return (
    <section aria-labelledby="slots">
      <h2 id="slots" className="mb-1.5">
        Slots and crew
      </h2>
      {slots.length === 0 ? (
        <p>This session has no slots.</p>
      ) : (
        <ul>
          {slots.map((slot) => (
            <SlotRow key={slot.id} slot={slot} on={on} />
          ))}
        </ul>
      )}
    </section>
  );
}
