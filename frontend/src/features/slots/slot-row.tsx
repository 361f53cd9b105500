import type { ReactNode } from 'react';
import { useEffect, useRef } from 'react';
import { Button } from '#frontend/components/button.tsx';
import { Limpet } from '#frontend/components/limpet.tsx';
import { listed, numberWord } from '#frontend/words/number-words.ts';
import type { SlotView } from '#shared/contracts/slots.ts';
import { Refusal, RefusedByServer } from './refusal.tsx';
import { ReleaseButton } from './release-button.tsx';
import type { OnSlot } from './use-claim-slot.ts';
import { useClaimSlot, useReleaseSlot } from './use-claim-slot.ts';

const LIMPET_PX = 24;

/**
 * One slot of a session: who holds it, what it needs, and what its reader may do with it. The
 * verdict is the server's, as it came with the slot.
 */
export function SlotRow({ slot, on }: { slot: SlotView; on: OnSlot }) {
  const claim = useClaimSlot(slot.id, on);
  const release = useReleaseSlot(slot.id, on);
  const heading = useRef<HTMLHeadingElement>(null);
  const isFirst = useRef(true);
  useEffect(() => {
    // The button that was pressed is gone, so the focus goes to what has changed.
    if (!isFirst.current) heading.current?.focus();
    isFirst.current = false;
  }, [slot.isYours]);
  const hasChanged = claim.isSuccess && slot.isYours;
  return (
    <li className="grid grid-cols-[2.25rem_1fr] border-t border-hair py-3 first:border-t-[1.5px] first:border-ink wide:grid-cols-[2.375rem_1fr_auto]">
      <span className="pt-px">
        <Limpet look={lookOf(slot)} sizePx={LIMPET_PX} isSettling={hasChanged} />
      </span>
      <div className="min-w-0">
        <h3 ref={heading} tabIndex={-1} className="mr-2.5 inline outline-none">
          {slot.slotKindName}
        </h3>
        <p className="inline">
          <Holder slot={slot} />
        </p>
        <SlotState slot={slot} />
        <p className="mt-0.5 text-xs text-barnacle">{needsInWords(slot)}</p>
        {slot.claim?.isGranted === false && (
          <Refusal reasons={slot.claim.reasons} standings={slot.standings} />
        )}
        {claim.error !== null && (
          <RefusedByServer title="The slot was not claimed." error={claim.error} />
        )}
        {release.error !== null && (
          <RefusedByServer title="The slot was not released." error={release.error} />
        )}
      </div>
      {(slot.claim?.isGranted === true || slot.release?.isGranted === true) && (
        <div className="pt-2.5 max-wide:col-start-2 wide:self-center wide:pt-0 wide:pl-5">
          {slot.claim?.isGranted === true && (
            <Button isWideOnPhone isBusy={claim.isPending} onPress={() => claim.mutate()}>
              {claim.isPending ? 'Claiming' : 'Claim this slot'}
              <span className="sr-only">, {slot.slotKindName.toLowerCase()}</span>
            </Button>
          )}
          {slot.release?.isGranted === true && (
            <ReleaseButton
              slot={slot}
              isBusy={release.isPending}
              onRelease={(onSettled) => {
                claim.reset();
                release.mutate(undefined, { onSettled });
              }}
            />
          )}
        </div>
      )}
    </li>
  );
}

function lookOf({ state, isYours }: SlotView): 'gap' | 'claimed' | 'in-doubt' | 'yours' {
  return state === 'claimed' && isYours ? 'yours' : state;
}

function Holder({ slot }: { slot: SlotView }): ReactNode {
  if (slot.state === 'gap') return <b className="text-anemone">Gap</b>;
  if (slot.isYours) return <b className="text-kelp">You</b>;
  return slot.holder?.name ?? 'Claimed';
}

function SlotState({ slot }: { slot: SlotView }) {
  return (
    <>
      {slot.state === 'in-doubt' && (
        <p className="mt-px text-ui">
          <b className="text-wrack">In doubt.</b>{' '}
          {slot.isYours
            ? 'You no longer meet what this slot needs on that day.'
            : 'The holder no longer meets what this slot needs on that day.'}
        </p>
      )}
      {slot.claim?.isGranted === true && slot.needs.length > 0 && (
        <p className="mt-px text-ui">{currentInWords(slot.needs.length)}</p>
      )}
      {slot.release !== null && !slot.release.isGranted && (
        <p className="mt-px text-ui">{slot.release.sentence}</p>
      )}
    </>
  );
}

function currentInWords(needs: number): string {
  if (needs === 1) return 'You will be current in it that day.';
  return `You will be current in ${needs === 2 ? 'both' : `all ${numberWord(needs)}`} that day.`;
}

function needsInWords({ needs, isFor18AndOver }: SlotView): string {
  const all = [...needs, ...(isFor18AndOver ? ['18 or over'] : [])];
  return all.length === 0 ? 'Needs no competency' : `Needs ${listed(all)}`;
}
