'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';

interface CopyButtonProps {
  /** What the button says: a verb with its object, e.g. "Copy tensor". */
  readonly words: string;
  readonly text: string;
}

/** Puts a text on the clipboard and says so; if the browser refuses, says that. */
export function CopyButton({ words, text }: CopyButtonProps) {
  const [answer, setAnswer] = useState('');
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(text);
      setAnswer('Copied');
    } catch (reason) {
      const why = reason instanceof Error ? ` (${reason.message})` : '';
      setAnswer(`The browser refused the clipboard${why}. Select the text and copy it by hand.`);
    }
  };
  return (
    <span className="no-print inline-flex flex-wrap items-baseline gap-x-2">
      <Button kind="quiet" onClick={() => void copy()}>
        {words}
      </Button>
      <span role="status" className="text-note text-ink-2">
        {answer}
      </span>
    </span>
  );
}
