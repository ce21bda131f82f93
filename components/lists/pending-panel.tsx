'use client';

import { type FormEvent, useState } from 'react';
import { ask, AskFailed } from '@/components/lists/ask';
import { type PendingEdits } from '@/components/lists/edits';
import { counted, countWords } from '@/components/lists/list-words';
import { Quoted } from '@/components/lists/quoted';
import { Actions } from '@/components/ui/actions';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { TextArea } from '@/components/ui/text-area';
import { TextLink } from '@/components/ui/text-link';
import { type EditProblem, itemOfEdit, type RowEdit, savedEditsSchema } from '@/lib/contracts/list-edits';

interface PendingPanelProps {
  readonly pending: PendingEdits;
  readonly onChange: (pending: PendingEdits | null) => void;
  readonly problems: readonly EditProblem[];
  readonly onProblems: (problems: readonly EditProblem[]) => void;
  readonly onOpen: (item: string) => void;
  /** The internal route that saves them. */
  readonly to: string;
  readonly newest: number;
  readonly rows: number;
  readonly listHref: string;
  readonly onSaved: (revision: number) => void;
}

/** The edits gathered so far: each can be undone, all are saved together as one revision, with a reason. */
export function PendingPanel(props: PendingPanelProps) {
  const { pending, onChange, problems, onProblems, onOpen, to, newest, rows, listHref, onSaved } = props;
  const [saving, setSaving] = useState(false);
  const [failure, setFailure] = useState<AskFailed | null>(null);
  const { base, edits } = pending;
  const overtaken = newest > base;

  const undo = (edit: RowEdit) => {
    onProblems(problems.filter(({ item }) => item !== itemOfEdit(edit)));
    onChange({ base, edits: edits.filter((one) => one !== edit) });
  };
  const save = async (reason: string) => {
    setSaving(true);
    setFailure(null);
    try {
      const saved = await ask(to, savedEditsSchema, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: JSON.stringify({ baseRevision: base, reason, edits }),
      });
      if (saved.status === 'problems') onProblems(saved.problems);
      else {
        onProblems([]);
        onChange(null);
        onSaved(saved.revision);
      }
    } catch (error) {
      if (!(error instanceof AskFailed)) throw error;
      setFailure(error);
    } finally {
      setSaving(false);
    }
  };
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    void save(String(new FormData(event.currentTarget).get('reason') ?? ''));
  };

  return (
    <Section
      title={`${counted(edits.length, 'edit')} not saved yet`}
      aside={`made from revision ${base}, kept in this browser`}
    >
      {failure === null ? null : (
        <Banner severity="blocker" word="Not saved" live>
          <p>{failure.message}</p>
        </Banner>
      )}
      {overtaken ? (
        <Banner
          severity="warning"
          live={failure?.status === 409}
          title={`The list has moved on to revision ${newest}`}
          action={
            <Button
              onClick={() => onChange({ base: newest, edits })}
            >{`Go on from revision ${newest}`}</Button>
          }
        >
          <p>
            <TextLink href={`${listHref}/changes?from=${base}&to=${newest}`}>
              {`See what changed from revision ${base} to ${newest}`}
            </TextLink>
            . Going on keeps your edits; a field that both changed is named when you save, and nothing is
            overwritten.
          </p>
        </Banner>
      ) : null}
      <Problems problems={problems} />
      <ul className="grid border-t border-rule">
        {edits.map((edit) => (
          <EditLine
            key={itemOfEdit(edit)}
            edit={edit}
            wrong={problems.some(({ item }) => item === itemOfEdit(edit))}
            onOpen={onOpen}
            onUndo={() => undo(edit)}
          />
        ))}
      </ul>
      <form onSubmit={submit} className="grid max-w-160 gap-4">
        <TextArea name="reason" label="Reason for the revision" rows={2} maxLength={1000} required />
        <Actions>
          <Button kind="primary" type="submit" disabled={saving || overtaken} aria-busy={saving}>
            {saving ? `Checking and saving ${counted(rows, 'row')}` : `Save revision ${base + 1}`}
          </Button>
          <Button
            kind="quiet"
            disabled={saving}
            onClick={() => {
              onProblems([]);
              onChange(null);
            }}
          >
            {edits.length === 1 ? 'Undo the edit' : `Undo all ${countWords(edits.length)} edits`}
          </Button>
        </Actions>
      </form>
    </Section>
  );
}

function Problems({ problems }: { readonly problems: readonly EditProblem[] }) {
  if (problems.length === 0) return null;
  return (
    <Banner
      severity="blocker"
      word="Not saved"
      live
      title={`The edits have ${counted(problems.length, 'problem')}`}
    >
      <ul className="grid gap-1">
        {problems.map(({ item, column, message }, index) => (
          <li key={index}>
            {item === null ? null : (
              <>
                Row <code>{item}</code>
                {column === null ? ': ' : `, column ${column}: `}
              </>
            )}
            <Quoted text={message} />
          </li>
        ))}
      </ul>
    </Banner>
  );
}

function EditLine({
  edit,
  wrong,
  onOpen,
  onUndo,
}: {
  readonly edit: RowEdit;
  readonly wrong: boolean;
  readonly onOpen: (item: string) => void;
  readonly onUndo: () => void;
}) {
  const item = itemOfEdit(edit);
  return (
    <li className="grid items-baseline gap-x-4 gap-y-1 border-b border-rule py-1 sm:grid-cols-[88px_minmax(120px,1fr)_3fr_auto]">
      <span className={wrong ? 'font-semibold text-limit' : 'text-ink-2'}>{EDIT_WORDS[edit.kind]}</span>
      <button
        type="button"
        onClick={() => onOpen(item)}
        className="cursor-pointer justify-self-start text-left font-mono text-spin underline decoration-1 underline-offset-2 wrap-anywhere hover:decoration-2"
      >
        {item}
      </button>
      <span className="min-w-0 wrap-anywhere">{fieldWords(edit)}</span>
      <Button kind="quiet" onClick={onUndo} aria-label={`Undo the edit of ${item}`}>
        Undo
      </Button>
    </li>
  );
}

const EDIT_WORDS: Readonly<Record<RowEdit['kind'], string>> = {
  change: 'Changed',
  add: 'Added',
  remove: 'Removed',
};

function fieldWords(edit: RowEdit): string {
  if (edit.kind === 'remove') return 'The row goes.';
  const seen = edit.kind === 'change' ? (edit.seen ?? {}) : {};
  return Object.entries(edit.fields)
    .filter(([name]) => name !== 'item')
    .map(([name, text]) =>
      edit.kind === 'add' ? `${name} ${text}` : `${name} from ${seen[name] || 'blank'} to ${text || 'blank'}`,
    )
    .join('; ');
}
