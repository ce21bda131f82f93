'use client';

import { type DragEvent, useId, useRef, useState } from 'react';
import { classes } from '@/components/ui/classes';
import { Field, fieldAria, type FieldWords } from '@/components/ui/field';

interface FileFieldProps extends FieldWords {
  readonly name: string;
  /** As of the input's accept, e.g. `.csv,text/csv`. */
  readonly accept?: string;
  readonly required?: boolean;
  readonly disabled?: boolean;
  /** Told of each choice; null when it was taken back. */
  readonly onFile?: (file: File | null) => void;
}

/** Choose a file or drop one on the field. A native file input: it goes with the form, or through `onFile`. */
export function FileField(props: FileFieldProps) {
  const { label, hint, error, optional, name, accept, required = false, disabled = false, onFile } = props;
  const id = useId();
  const words = { label, hint, error, ...(optional === undefined ? {} : { optional }) };
  const input = useRef<HTMLInputElement>(null);
  const [file, setFile] = useState<File | null>(null);
  const [over, setOver] = useState(false);

  const take = (chosen: File | null) => {
    setFile(chosen);
    onFile?.(chosen);
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const dropped = event.dataTransfer.files.item(0);
    if (!dropped || !input.current || disabled) return;
    const one = new DataTransfer();
    one.items.add(dropped);
    input.current.files = one.files;
    take(dropped);
  };

  return (
    <Field id={id} {...words}>
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={classes(
          'grid gap-1 rounded border border-dashed px-4 py-4',
          over ? 'border-spin bg-chosen' : 'border-ink-2 bg-sheet',
        )}
      >
        <input
          ref={input}
          {...fieldAria(id, words)}
          type="file"
          name={name}
          {...(accept === undefined ? {} : { accept })}
          required={required}
          disabled={disabled}
          onChange={(event) => take(event.target.files?.item(0) ?? null)}
          className={classes(
            'w-full cursor-pointer text-body text-ink-2 file:mr-3 file:min-h-8 file:cursor-pointer file:rounded file:border file:border-solid',
            'file:border-ink-2 file:bg-transparent file:px-4 file:py-1 file:font-semibold file:text-ink hover:file:bg-hover',
          )}
        />
        <p className="text-note text-ink-2" aria-live="polite">
          {file ? `${file.name}, ${fileSize(file.size)}` : 'Or drop the file here.'}
        </p>
      </div>
    </Field>
  );
}

/** Bytes in words, to three figures. */
export function fileSize(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  const [size, unit] = bytes < 1_000_000 ? [bytes / 1000, 'kB'] : [bytes / 1_000_000, 'MB'];
  return `${Number(size.toPrecision(3))} ${unit}`;
}
