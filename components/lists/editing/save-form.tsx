'use client';

import { type FormEvent, type ReactNode } from 'react';
import { counted } from '@/components/lists/list-words';
import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { TextArea } from '@/components/ui/text-area';

interface SaveFormProps {
  readonly next: number;
  readonly rows: number;
  readonly busy: boolean;
  readonly onSave: (reason: string) => void;
  readonly children: ReactNode;
}

/** The draft becomes a revision, with a reason. */
export function SaveForm({ next, rows, busy, onSave, children }: SaveFormProps) {
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    onSave(String(new FormData(event.currentTarget).get('reason') ?? ''));
  };
  return (
    <form onSubmit={submit} className="grid content-start gap-4">
      <TextArea name="reason" label="Reason for the revision" rows={2} maxLength={1000} required />
      <Actions>
        <Button kind="primary" type="submit" disabled={busy || rows === 0} aria-busy={busy}>
          {busy ? `Checking and saving ${counted(rows, 'edited row')}` : `Save revision ${next}`}
        </Button>
        {children}
      </Actions>
    </form>
  );
}
