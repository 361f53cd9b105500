import { Button } from '#frontend/components/button.tsx';
import { RefusedByServer } from './refusal.tsx';
import type { OnSlot } from './use-claim-slot.ts';
import { useClaimSlot } from './use-claim-slot.ts';

/** Claims a slot straight from a list; `whole` is what is claimed, said after the word. */
export function ClaimButton(props: {
  readonly slotId: string;
  readonly whole: string;
  readonly on: OnSlot;
}) {
  const claim = useClaimSlot(props.slotId, props.on);
  return (
    <div className="flex-none text-right">
      <Button look="line" isBusy={claim.isPending} onPress={() => claim.mutate()}>
        <span>
          {claim.isPending ? 'Claiming' : 'Claim'} <span className="sr-only">{props.whole}</span>
        </span>
      </Button>
      {claim.error !== null && (
        <div className="max-w-56 text-left">
          <RefusedByServer title="The slot was not claimed." error={claim.error} />
        </div>
      )}
    </div>
  );
}
