'use client';

import { type ReactNode } from 'react';
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components';
import { Button } from '@/components/ui/button';

interface DialogProps {
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
  readonly title: string;
  readonly children: ReactNode;
  /** Asks something that must be answered: announced at once, not dismissed by a click beside it. */
  readonly asks?: boolean;
}

/** A sheet laid over the page. Focus stays inside, Escape closes it and goes back to where it was. */
export function Dialog({ open, onOpenChange, title, children, asks = false }: DialogProps) {
  return (
    <ModalOverlay
      isOpen={open}
      onOpenChange={onOpenChange}
      isDismissable={!asks}
      className="dialog-ground fixed inset-0 z-50 grid place-items-center overflow-y-auto p-4"
    >
      <Modal className="w-full max-w-160 border border-ink bg-sheet">
        <AriaDialog
          role={asks ? 'alertdialog' : 'dialog'}
          className="grid max-h-[85vh] gap-4 overflow-y-auto p-6 outline-none"
        >
          {({ close }) => (
            <>
              <div className="flex items-baseline justify-between gap-4">
                <Heading slot="title" className="text-section font-semibold">
                  {title}
                </Heading>
                <Button kind="quiet" onClick={close}>
                  Close
                </Button>
              </div>
              {children}
            </>
          )}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  );
}
