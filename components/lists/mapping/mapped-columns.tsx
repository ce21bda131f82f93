import { COLUMN_GROUPS, columnWords } from '@/components/lists/mapping/column-words';
import { Quoted } from '@/components/lists/quoted';
import { SelectControl } from '@/components/ui/select-control';
import { SeverityMark } from '@/components/ui/severity';
import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { withUse, asColumn } from '@/lib/ingest/mapping/draft';
import { cellText, columnLetters, type GridRow } from '@/lib/ingest/mapping/grid';
import { type ColumnGuess } from '@/lib/ingest/mapping/guess';
import { type ColumnUse, dimensionOfColumn, type Draft } from '@/lib/ingest/mapping/mapping';
import { type ColumnUnit, UNITS_OF } from '@/lib/ingest/mapping/unit-words';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface MappedColumnsProps {
  readonly draft: Draft;
  readonly guesses: readonly ColumnGuess[];
  readonly rows: readonly GridRow[];
  readonly declarations: ListDeclarations;
  readonly onDraft: (draft: Draft) => void;
}

const SAMPLES = 3;

/** Every column of the file: its heading and first values, what it becomes, in which unit, and why that was guessed. */
export function MappedColumns({ draft, guesses, rows, declarations, onDraft }: MappedColumnsProps) {
  return (
    <ol className="grid border-t border-rule">
      {draft.columns.map(({ heading, to }, index) => (
        <li
          key={index}
          className="grid gap-x-4 gap-y-1 border-b border-rule py-2 md:grid-cols-[minmax(0,5fr)_minmax(0,4fr)_minmax(0,3fr)]"
        >
          <div className="min-w-0">
            <p className="font-semibold wrap-anywhere">
              <span className="num mr-2 font-normal text-ink-2">{columnLetters(index)}</span>
              {heading === '' ? 'No heading' : heading}
            </p>
            <p className="truncate font-mono text-note text-ink-2">{samplesOf(rows, index)}</p>
          </div>
          <div>
            <SelectControl
              aria-label={`Meaning of column ${columnLetters(index)}, ${heading}`}
              aria-describedby={`why-${index}`}
              aria-invalid={to === null ? true : undefined}
              value={valueOf(to)}
              onChange={({ target }) => onDraft(withUse(draft, index, asUse(target.value, heading)))}
            >
              <option value="">Choose what it is</option>
              <option value="extra">Keep with the row</option>
              <option value="ignored">Leave out</option>
              {COLUMN_GROUPS.map(({ title, columns }) => (
                <optgroup key={title} label={title}>
                  {columns.map((column) => (
                    <option key={column} value={column}>
                      {columnWords(column)}
                    </option>
                  ))}
                </optgroup>
              ))}
            </SelectControl>
          </div>
          <UnitSelect
            to={to}
            label={`Unit of column ${columnLetters(index)}, ${heading}`}
            declarations={declarations}
            onUnit={(unit) => {
              if (to?.use === 'column') onDraft(withUse(draft, index, { ...to, unit }));
            }}
          />
          <p id={`why-${index}`} className="flex gap-1 text-note text-ink-2 md:col-span-2 md:col-start-2">
            {to === null ? (
              <span className="flex h-4 items-center">
                <SeverityMark severity="warning" />
              </span>
            ) : null}
            <span>
              <Quoted text={whyOf(guesses[index], to)} />
            </span>
          </p>
        </li>
      ))}
    </ol>
  );
}

function UnitSelect({
  to,
  label,
  declarations,
  onUnit,
}: {
  readonly to: ColumnUse | null;
  readonly label: string;
  readonly declarations: ListDeclarations;
  readonly onUnit: (unit: ColumnUnit | null) => void;
}) {
  const dimension = to?.use === 'column' ? dimensionOfColumn(to.column) : null;
  if (to?.use !== 'column' || dimension === null) return <span className="max-md:hidden" />;
  const declared = {
    mass: declarations.massUnit,
    length: declarations.lengthUnit,
    inertia: declarations.inertiaUnit,
    angle: null,
    share: null,
  }[dimension];
  return (
    <SelectControl
      aria-label={label}
      value={to.unit ?? ''}
      onChange={({ target }) => onUnit(UNITS_OF[dimension].find((unit) => unit === target.value) ?? null)}
    >
      {declared === null ? null : <option value="">{`${declared}, as declared`}</option>}
      {UNITS_OF[dimension].map((unit) => (
        <option key={unit} value={unit}>
          {unit}
        </option>
      ))}
    </SelectControl>
  );
}

function samplesOf(rows: readonly GridRow[], index: number): string {
  const values = rows.map((row) => cellText(row.cells[index])).filter((text) => text !== '');
  return values.length === 0 ? 'No values in the rows seen' : values.slice(0, SAMPLES).join(' · ');
}

function valueOf(to: ColumnUse | null): string {
  if (to === null) return '';
  return to.use === 'column' ? to.column : to.use;
}

function asUse(value: string, heading: string): ColumnUse | null {
  if (value === '') return null;
  if (value === 'extra' || value === 'ignored') return { use: value };
  return asColumn(value as ListColumn, heading);
}

/** The guess in words while it stands, or what it would be while nothing is chosen. */
function whyOf(guess: ColumnGuess | undefined, to: ColumnUse | null): string {
  if (guess === undefined) return '';
  if (to === null) {
    const unit = guess.to.use === 'column' && guess.to.unit !== null ? `, ${guess.to.unit}` : '';
    const could =
      guess.to.use === 'column' ? `Perhaps ${columnWords(guess.to.column)}${unit}.` : 'Not clear.';
    return `${could} ${guess.because}`;
  }
  return valueOf(guess.to) === valueOf(to) ? guess.because : 'You chose it.';
}
