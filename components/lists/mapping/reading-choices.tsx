import { Quoted } from '@/components/lists/quoted';
import { RadioGroup } from '@/components/ui/choice';
import { type Draft } from '@/lib/ingest/mapping/mapping';
import { type NumberStyle, styleExample, type StyleEvidence } from '@/lib/ingest/mapping/number-style';

interface ReadingChoicesProps {
  readonly draft: Draft;
  readonly numbers: StyleEvidence;
  readonly onDraft: (draft: Draft) => void;
}

const STYLES: readonly NumberStyle[] = [
  { decimal: '.', thousands: '' },
  { decimal: '.', thousands: ',' },
  { decimal: ',', thousands: '' },
  { decimal: ',', thousands: '.' },
  { decimal: '.', thousands: ' ' },
  { decimal: ',', thousands: ' ' },
  { decimal: '.', thousands: "'" },
  { decimal: ',', thousands: "'" },
];

/** How numbers are written, what a figure is of, and which rows are no components. */
export function ReadingChoices({ draft, numbers, onDraft }: ReadingChoicesProps) {
  const style = draft.numbers === null ? '' : styleExample(draft.numbers);
  return (
    <div className="grid gap-6 md:grid-cols-2">
      <RadioGroup
        name="numbers"
        label="Numbers are written"
        hint={<Quoted text={numbers.style === null ? numbers.question : numbers.because} />}
        inline
        value={style}
        onChange={(value) =>
          onDraft({ ...draft, numbers: STYLES.find((one) => styleExample(one) === value) ?? null })
        }
        options={STYLES.map((one) => ({
          value: styleExample(one),
          label: <span className="num">{styleExample(one)}</span>,
        }))}
      />
      <RadioGroup
        name="per"
        label="Mass and own inertia are of"
        hint="Where a row stands for several pieces."
        value={draft.per ?? ''}
        onChange={(value) => onDraft({ ...draft, per: value === 'row' ? 'row' : 'piece' })}
        options={[
          { value: 'piece', label: 'One piece' },
          {
            value: 'row',
            label: 'All pieces of the row together',
            hint: 'They are divided by the quantity.',
          },
        ]}
      />
      <LeaveOutChoice
        draft={draft}
        kind="totals"
        label="Rows that look like totals"
        hint="Left out, they are held against the sum of the rows before them."
        onDraft={onDraft}
      />
      <LeaveOutChoice
        draft={draft}
        kind="texts"
        label="Rows of one text and nothing else"
        hint="Titles between rows, and notes at the end."
        onDraft={onDraft}
      />
      <LeaveOutChoice draft={draft} kind="headings" label="Rows that repeat the headings" onDraft={onDraft} />
    </div>
  );
}

function LeaveOutChoice({
  draft,
  kind,
  label,
  hint,
  onDraft,
}: {
  readonly draft: Draft;
  readonly kind: keyof Draft['leaveOut'];
  readonly label: string;
  readonly hint?: string;
  readonly onDraft: (draft: Draft) => void;
}) {
  const value = draft.leaveOut[kind];
  return (
    <RadioGroup
      name={`leave-${kind}`}
      label={label}
      {...(hint === undefined ? {} : { hint })}
      inline
      value={value === null ? '' : value ? 'out' : 'in'}
      onChange={(chosen) => onDraft({ ...draft, leaveOut: { ...draft.leaveOut, [kind]: chosen === 'out' } })}
      options={[
        { value: 'out', label: 'Leave out' },
        { value: 'in', label: 'Read as components' },
      ]}
    />
  );
}
