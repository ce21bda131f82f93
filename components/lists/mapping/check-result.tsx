import { counted } from '@/components/lists/list-words';
import { ProblemTable } from '@/components/lists/problem-table';
import { Banner } from '@/components/ui/banner';
import { Checkbox } from '@/components/ui/choice';
import { SeverityMark } from '@/components/ui/severity';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type MappingCheck } from '@/lib/contracts/list-mapping';

interface CheckResultProps {
  readonly check: MappingCheck;
  readonly accepted: boolean;
  readonly onAccept: (accepted: boolean) => void;
}

/** What reading the whole file by the mapping found: problems, totals against their rows, rows left out. */
export function CheckResult({ check, accepted, onAccept }: CheckResultProps) {
  const wrong = check.totals.filter(({ agrees }) => !agrees);
  return (
    <div className="grid gap-6" aria-live="polite">
      {check.problemCount === 0 ? (
        <Banner severity="done" title={`${counted(check.rows, 'row')} can be read`}>
          <p>
            {check.leftOutCount === 0
              ? 'No row is left out.'
              : `${counted(check.leftOutCount, 'row')} left out, named below.`}
          </p>
        </Banner>
      ) : (
        <Banner
          severity="blocker"
          word="Not yet"
          title={`The file has ${counted(check.problemCount, 'problem')} as it is mapped`}
        >
          <p>Change the mapping, or put the file right and upload it again.</p>
        </Banner>
      )}
      {check.problems.length === 0 ? null : <ProblemTable problems={check.problems} />}
      {check.totals.length === 0 ? null : (
        <Table caption="Totals rows against the rows before them">
          <thead>
            <tr>
              <ColumnHead side="right">Line</ColumnHead>
              <ColumnHead>Column</ColumnHead>
              <ColumnHead side="right">The file says</ColumnHead>
              <ColumnHead side="right">The rows give</ColumnHead>
              <ColumnHead>Unit</ColumnHead>
              <ColumnHead>Agrees</ColumnHead>
            </tr>
          </thead>
          <tbody>
            {check.totals.map(({ line, heading, what, unit, stated, computed, agrees }) => (
              <tr key={`${line} ${what}`}>
                <RowHead>
                  <span className="num block text-right">{line}</span>
                </RowHead>
                <Cell>{heading}</Cell>
                <Cell side="right" className="num">
                  {stated}
                </Cell>
                <Cell side="right" className="num">
                  {Number(computed.toPrecision(8))}
                </Cell>
                <Cell>{unit}</Cell>
                <Cell>
                  <span className="inline-flex items-center gap-1">
                    <SeverityMark severity={agrees ? 'done' : 'warning'} />
                    {agrees ? 'Yes' : 'No'}
                  </span>
                </Cell>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      {wrong.length === 0 ? null : (
        <Checkbox
          name="accept-totals"
          checked={accepted}
          onChange={({ target }) => onAccept(target.checked)}
          label="I have seen that a total does not agree, and go on"
          hint="That you went on is kept with the import."
        />
      )}
      {check.leftOut.length === 0 ? null : (
        <details>
          <summary className="cursor-pointer font-semibold">{`Rows left out: ${check.leftOutCount}`}</summary>
          <ul className="mt-2 grid border-t border-rule">
            {check.leftOut.map(({ line, why, text }) => (
              <li key={line} className="flex flex-wrap gap-x-4 border-b border-rule py-1">
                <span className="num w-16 text-right">{line}</span>
                <span className="text-ink-2">{why}</span>
                <span className="min-w-0 wrap-anywhere">{text}</span>
              </li>
            ))}
          </ul>
        </details>
      )}
    </div>
  );
}
