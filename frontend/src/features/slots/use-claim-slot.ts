import { useMutation } from '@tanstack/react-query';
import { call } from '#frontend/api/call.ts';
import { ProblemError } from '#frontend/api/problem-error.ts';
import type { SlotView } from '#shared/contracts/slots.ts';

/** What a page does when slots may have changed hands. */
export interface OnSlot {
  /** The slot as the server answered it: kept, and everything around it asked again. */
  readonly onChanged: (slot: SlotView) => void;
  /** The server saw something that this page did not: everything is asked again. */
  readonly onRefused: () => void;
}

/** Takes a slot for the reader. A refusal comes as a ProblemError with every reason. */
export function useClaimSlot(slotId: string, { onChanged, onRefused }: OnSlot) {
  return useMutation({
    mutationFn: () => call('claimSlot', { params: { slotId } }),
    onSuccess: onChanged,
    onError: (error) => {
      if (error instanceof ProblemError) onRefused();
    },
  });
}

/** Gives back a slot that the reader holds. */
export function useReleaseSlot(slotId: string, { onChanged, onRefused }: OnSlot) {
  return useMutation({
    mutationFn: () => call('releaseSlot', { params: { slotId } }),
    onSuccess: onChanged,
    onError: (error) => {
      if (error instanceof ProblemError) onRefused();
    },
  });
}
