import type { ReactNode } from 'react';
import { Dialog, Heading, Modal, ModalOverlay } from 'react-aria-components';
import { Button } from './button.tsx';

/**
 * Asks before something that others will notice. The focus goes into it, stays there until it is
 * closed, and returns to where it was.
 */
export function ConfirmDialog(props: {
  readonly title: string;
  readonly confirmWords: string;
  readonly backWords: string;
  readonly isOpen: boolean;
  readonly isBusy: boolean;
  readonly onConfirm: () => void;
  readonly onClose: () => void;
  readonly children: ReactNode;
}) {
  return (
    <ModalOverlay
      isOpen={props.isOpen}
      isDismissable
      onOpenChange={(isOpen) => {
        if (!isOpen) props.onClose();
      }}
      className="fixed inset-0 z-30 grid place-items-center bg-ink/40 p-4"
    >
      <Modal className="w-full max-w-words rounded-md border border-edge bg-paper">
        <Dialog role="alertdialog" className="p-6 outline-none">
          <Heading slot="title" className="text-lg">
            {props.title}
          </Heading>
          <div className="mt-2 text-ui">{props.children}</div>
          <div className="mt-6 flex flex-wrap justify-end gap-3">
            <Button look="line" onPress={props.onClose}>
              {props.backWords}
            </Button>
            <Button look="stop" isBusy={props.isBusy} onPress={props.onConfirm}>
              {props.confirmWords}
            </Button>
          </div>
        </Dialog>
      </Modal>
    </ModalOverlay>
  );
}
