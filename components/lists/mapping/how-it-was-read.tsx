import { columnWords } from '@/components/lists/mapping/column-words';
import { DefinitionList } from '@/components/ui/definition-list';
import { Section } from '@/components/ui/section';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { styleExample } from '@/lib/ingest/mapping/number-style';
import { type LeftOutRow } from '@/lib/ingest/mapping/read-mapped';
import { type TotalFigure } from '@/lib/ingest/mapping/totals';

interface HowItWasReadProps {
  readonly mapping: Mapping;
  readonly author: string;
  readonly at: Date;
  /** Null until the import is done. */
  readonly leftOut: { readonly rows: readonly LeftOutRow[] } | null;
  readonly totals: readonly TotalFigure[] | null;
  readonly acceptTotals: boolean;
}

/** By which mapping the file of an import is read, who made it, and what it left out. */
export function HowItWasRead({ mapping, author, at, leftOut, totals, acceptTotals }: HowItWasReadProps) {
  const { header, sheet, numbers, per, columns } = mapping;
  const differing = totals?.filter(({ agrees }) => !agrees) ?? [];
  return (
    <Section
      title="How its columns are read"
      lead={`As ${author} mapped them on ${at.toISOString().slice(0, 10)}.`}
    >
      <dl className="grid border-t border-rule">
        {columns.map(({ heading, to }, index) => (
          <div key={index} className="grid gap-x-4 border-b border-rule py-1 sm:grid-cols-2">
            <dt className="wrap-anywhere">{heading === '' ? `Column ${index + 1}` : heading}</dt>
            <dd className="text-ink-2">
              {to.use === 'column'
                ? [columnWords(to.column), to.unit].filter((part) => part !== null).join(', ')
                : to.use === 'extra'
                  ? 'Kept with the row'
                  : 'Left out'}
            </dd>
          </div>
        ))}
      </dl>
      <DefinitionList
        items={[
          ...(sheet === null ? [] : [{ term: 'Sheet', value: sheet }]),
          {
            term: 'Headings',
            value:
              header.first === header.last ? `Row ${header.first}` : `Rows ${header.first} to ${header.last}`,
          },
          { term: 'Numbers', value: <span className="num">{styleExample(numbers)}</span> },
          { term: 'Mass is of', value: per === 'row' ? 'All pieces of a row' : 'One piece' },
          ...(leftOut === null
            ? []
            : [
                {
                  term: 'Left out',
                  value:
                    leftOut.rows.length === 0
                      ? 'No row'
                      : leftOut.rows.map(({ line, why }) => `${line} (${why})`).join(', '),
                },
              ]),
          ...(differing.length === 0 || !acceptTotals
            ? []
            : [
                {
                  term: 'Accepted',
                  value: differing
                    .map(
                      ({ line, what, stated, computed, unit }) =>
                        `row ${line}: ${what} ${stated} ${unit}, its rows give ${Number(computed.toPrecision(8))}`,
                    )
                    .join('; '),
                },
              ]),
        ]}
      />
    </Section>
  );
}
