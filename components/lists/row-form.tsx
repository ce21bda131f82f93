'use client';

import { type FormEvent, type ReactNode, useId } from 'react';
import { rowFieldGroups, type RowField } from '@/components/lists/row-fields';
import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { SelectField } from '@/components/ui/select-field';
import { TextArea } from '@/components/ui/text-area';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type EditProblem } from '@/lib/contracts/list-edits';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface RowFormProps {
  readonly declarations: ListDeclarations;
  /** What the fields begin with; no item: a new row. */
  readonly texts: Readonly<Record<string, string>>;
  /** Columns of the list's own. */
  readonly own: readonly string[];
  readonly isNew: boolean;
  readonly problems: readonly EditProblem[];
  readonly onDone: (form: Readonly<Record<string, string>>) => void;
  readonly onLeave: () => void;
  /** Told at the first letter that is typed. */
  readonly onTyped: () => void;
}

/** The fields of one row in the units of its list. What is typed is read and checked when the edits are saved. */
export function RowForm({
  declarations,
  texts,
  own,
  isNew,
  problems,
  onDone,
  onLeave,
  onTyped,
}: RowFormProps) {
  const done = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = Object.fromEntries(
      [...new FormData(event.currentTarget)].map(([name, value]) => [
        name,
        typeof value === 'string' ? value : '',
      ]),
    );
    onDone(isNew ? Object.fromEntries(Object.entries(form).filter(([, text]) => text.trim() !== '')) : form);
  };
  const wrong = (column: string) =>
    problems.filter((problem) => problem.column === column).map(({ message }) => message);
  return (
    <form onSubmit={done} onInput={onTyped} className="grid gap-6">
      <h3 className="text-lead font-semibold wrap-anywhere">{isNew ? 'New row' : (texts['item'] ?? '')}</h3>
      {rowFieldGroups(declarations).map(({ title, fields }) => (
        <FieldGroup key={title} title={title}>
          <div className="grid grid-cols-2 items-start gap-3">
            {fields.map((field) => (
              <div key={field.column} className={field.kind === 'text' ? 'col-span-2' : ''}>
                <Input
                  field={field}
                  text={texts[field.column] ?? ''}
                  error={wrong(field.column)}
                  fixed={!isNew && field.column === 'item'}
                />
              </div>
            ))}
          </div>
        </FieldGroup>
      ))}
      {own.length === 0 ? null : (
        <FieldGroup title="Columns of the list's own">
          {own.map((name) => (
            <TextField
              key={name}
              name={name}
              label={name}
              defaultValue={texts[name] ?? ''}
              error={wrong(name)}
            />
          ))}
        </FieldGroup>
      )}
      <div className="sticky bottom-0 z-10 border-t border-ink-2 bg-paper py-2">
        <Actions>
          <Button kind="secondary" type="submit">
            {isNew ? 'Add to the edits' : 'Keep the edit'}
          </Button>
          <Button kind="quiet" onClick={onLeave}>
            Leave without
          </Button>
        </Actions>
      </div>
    </form>
  );
}

function FieldGroup({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  const id = useId();
  return (
    <div role="group" aria-labelledby={id} className="grid gap-3 border-t border-rule pt-3">
      <h4 id={id} className="text-lead">
        {title}
      </h4>
      {children}
    </div>
  );
}

function Input({
  field,
  text,
  error,
  fixed,
}: {
  readonly field: RowField;
  readonly text: string;
  readonly error: readonly string[];
  readonly fixed: boolean;
}) {
  const { column, label, kind, unit, choices = [], blank } = field;
  const shared = { name: column, label, defaultValue: text, error };
  if (kind === 'choice') {
    return (
      <SelectField
        {...shared}
        options={[
          { value: '', label: `Blank: ${blank ?? 'none'}` },
          ...choices.map((choice) => ({ value: choice, label: choice })),
        ]}
      />
    );
  }
  const placeholder = blank === undefined ? {} : { placeholder: blank };
  if (kind === 'number')
    return <NumberField {...shared} {...placeholder} {...(unit === undefined ? {} : { unit })} />;
  if (column === 'note') return <TextArea {...shared} rows={2} />;
  return (
    <TextField
      {...shared}
      {...placeholder}
      readOnly={fixed}
      required={column === 'item'}
      autoComplete="off"
      {...(fixed ? { hint: 'What the row is known by; it stays.' } : {})}
    />
  );
}
