'use client';

import { type ReactNode } from 'react';
import { useFormStatus } from 'react-dom';
import { Button } from '@/components/ui/button';
import { type ButtonKind } from '@/components/ui/button-style';

interface SubmitButtonProps {
  readonly children: ReactNode;
  /** What is being done while the form is on its way, e.g. "Saving revision". */
  readonly pendingWords: string;
  readonly kind?: ButtonKind;
  readonly name?: string;
  readonly value?: string;
  readonly disabled?: boolean;
}

/** Submits the form around it, once. */
export function SubmitButton({
  children,
  pendingWords,
  kind = 'primary',
  disabled = false,
  ...rest
}: SubmitButtonProps) {
  const { pending } = useFormStatus();
  return (
    <Button {...rest} kind={kind} type="submit" disabled={pending || disabled} aria-busy={pending}>
      {pending ? pendingWords : children}
    </Button>
  );
}
