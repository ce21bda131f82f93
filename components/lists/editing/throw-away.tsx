'use client';

import { useState } from 'react';
import { z } from 'zod';
import { ask, AskFailed } from '@/components/lists/ask';
import { counted } from '@/components/lists/list-words';
import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { DialogButton } from '@/components/ui/dialog-button';
import { FieldError } from '@/components/ui/field';

interface ThrowAwayProps {
  /** The draft's internal route. */
  readonly route: string;
  readonly rows: number;
  /** Everything kept first: the version to throw away, or null where that failed. */
  readonly version: () => Promise<number | null>;
  readonly onGone: () => void;
}

/** Asks once, then throws a draft away as it was seen. */
export function ThrowAway({ route, rows, version, onGone }: ThrowAwayProps) {
  const [failure, setFailure] = useState<string | null>(null);
  const throwAway = async () => {
    setFailure(null);
    try {
      const seen = await version();
      if (seen === null) {
        setFailure('The last edits are not kept on the server yet. Try again when they are.');
        return;
      }
      if (seen > 0) await ask(`${route}?version=${seen}`, z.object({}), { method: 'DELETE' });
      onGone();
    } catch (error) {
      if (!(error instanceof AskFailed)) throw error;
      setFailure(error.message);
    }
  };
  return (
    <DialogButton words="Throw the draft away" kind="quiet" title="Throw the draft away?" asks>
      <p>The edits of {counted(rows, 'row')} go for good. The list keeps the revision that it has.</p>
      {failure === null ? null : <FieldError id="throw-away-failed" text={failure} />}
      <Actions>
        <Button kind="danger" onClick={() => void throwAway()}>
          Throw it away
        </Button>
      </Actions>
    </DialogButton>
  );
}
