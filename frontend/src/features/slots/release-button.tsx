import { lazy, Suspense, useState } from 'react';
import { Button } from '#frontend/components/button.tsx';
import type { SlotView } from '#shared/contracts/slots.ts';

// Only who holds a slot ever needs it, and it is larger than the rest of the page.
const ConfirmDialog = lazy(async () => ({
  default: (await import('#frontend/components/confirm-dialog.tsx')).ConfirmDialog,
}));

/** Gives back the reader's own slot, after asking. */
export function ReleaseButton(props: {
  readonly slot: SlotView;
  readonly isBusy: boolean;
  readonly onRelease: (onSettled: () => void) => void;
}) {
  const { slot, isBusy, onRelease } = props;
  const [isAsking, setIsAsking] = useState(false);
  const close = (): void => setIsAsking(false);
  return (
    <>
      <Button look="line" isWideOnPhone onPress={() => setIsAsking(true)}>
        Release this slot
      </Button>
      {isAsking && (
        <Suspense fallback={null}>
          <ConfirmDialog
            title={`Release ${slot.slotKindName.toLowerCase()}?`}
            confirmWords={isBusy ? 'Releasing' : 'Release it'}
            backWords="Keep it"
            isOpen
            isBusy={isBusy}
            onConfirm={() => onRelease(close)}
            onClose={close}
          >
            <p>The slot becomes a gap, and anybody who may take it can claim it at once.</p>
          </ConfirmDialog>
        </Suspense>
      )}
    </>
  );
}
