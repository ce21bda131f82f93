'use client';

import { type ReactNode, useState } from 'react';
import { Button } from '@/components/ui/button';
import { type ButtonKind } from '@/components/ui/button-style';
import { Dialog } from '@/components/ui/dialog';

interface DialogButtonProps {
  /** The button's words: a verb with its object. */
  readonly words: string;
  readonly kind?: ButtonKind;
  readonly title: string;
  readonly asks?: boolean;
  readonly children: ReactNode;
}

/** A button that opens a dialog, for a form or a question that needs no page of its own. */
export function DialogButton({
  words,
  kind = 'secondary',
  title,
  asks = false,
  children,
}: DialogButtonProps) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind={kind} onClick={() => setOpen(true)}>
        {words}
      </Button>
      <Dialog open={open} onOpenChange={setOpen} title={title} asks={asks}>
        {children}
      </Dialog>
    </>
  );
}
