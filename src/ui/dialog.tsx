import type { ReactNode } from 'react';
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components';

interface DialogProps {
  readonly isOpen: boolean;
  readonly onClose: () => void;
  readonly title: string;
  /** Room for a table. */
  readonly wide?: boolean;
  readonly children: ReactNode;
}

/** A question that holds the page until it is answered; Escape and a press outside close it, focus goes back. */
export function Dialog({ isOpen, onClose, title, wide = false, children }: DialogProps) {
  return (
    <ModalOverlay
      isOpen={isOpen}
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      isDismissable
      className="fixed inset-0 z-50 grid place-items-end bg-ink/35 sm:place-items-center sm:p-4"
    >
      <Modal
        className={`w-full bg-paper shadow-float outline-none sm:rounded-md ${wide ? 'max-h-[92dvh] overflow-y-auto sm:max-w-[76rem]' : 'sm:max-w-[30rem]'}`}
      >
        <AriaDialog className="p-6 outline-none">
          <Heading slot="title" className="serif mb-3 text-name">
            {title}
          </Heading>
          {children}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  );
}
