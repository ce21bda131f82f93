'use client';

import { Quoted } from '@/components/lists/quoted';
import { type KeyboardEvent, useEffect, useId, useRef, useState } from 'react';

/** Which way the grid goes on after a cell is done. */
export type Onward = 'down' | 'up' | 'right' | 'left' | 'stay';

interface CellEditorProps {
  readonly label: string;
  readonly start: string;
  readonly isNumber: boolean;
  readonly choices: readonly string[] | undefined;
  /** What would be wrong with the cell if it held this. */
  readonly check: (text: string) => string | null;
  readonly onDone: (text: string, onward: Onward) => void;
  readonly onCancel: () => void;
}

/** The text of one cell while it is typed, and what is wrong with it so far. */
export function CellEditor({ label, start, isNumber, choices, check, onDone, onCancel }: CellEditorProps) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  const [text, setText] = useState(start);
  const over = useRef(false);
  useEffect(() => {
    const field = input.current;
    field?.focus();
    field?.setSelectionRange(field.value.length, field.value.length);
  }, []);
  const wrong = check(text);
  const done = (onward: Onward) => {
    if (over.current) return;
    over.current = true;
    onDone(text, onward);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    event.stopPropagation();
    if (event.nativeEvent.isComposing) return;
    if (event.key === 'Enter') done(event.shiftKey ? 'up' : 'down');
    else if (event.key === 'Tab') done(event.shiftKey ? 'left' : 'right');
    else if (event.key === 'Escape') {
      over.current = true;
      onCancel();
    } else return;
    event.preventDefault();
  };
  return (
    <>
      <input
        ref={input}
        value={text}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={onKeyDown}
        onBlur={() => done('stay')}
        onPaste={(event) => event.stopPropagation()}
        onCopy={(event) => event.stopPropagation()}
        onCut={(event) => event.stopPropagation()}
        aria-label={label}
        aria-invalid={wrong !== null}
        aria-describedby={wrong === null ? undefined : `${id}-wrong`}
        list={choices === undefined ? undefined : `${id}-choices`}
        inputMode={isNumber ? 'decimal' : 'text'}
        autoComplete="off"
        spellCheck={false}
        className={isNumber ? 'cell-input num text-right' : 'cell-input'}
      />
      {choices === undefined ? null : (
        <datalist id={`${id}-choices`}>
          {choices.map((choice) => (
            <option key={choice} value={choice} />
          ))}
        </datalist>
      )}
      {wrong === null ? null : (
        <span id={`${id}-wrong`} className="cell-wrong" aria-live="polite">
          <Quoted text={wrong} />
        </span>
      )}
    </>
  );
}
