import { Num } from '@/components/mass/num';
import { AllowanceForm } from '@/components/settings/allowance-form';
import { MATURITY_WORDS } from '@/components/settings/words';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';
import { MATURITIES, type Maturity } from '@/lib/mass/component';

interface AllowanceTableProps {
  readonly allowances: readonly {
    readonly maturity: Maturity;
    readonly fraction: number;
    readonly source: string;
  }[];
  readonly program: string;
  /** Null for those who may only look. */
  readonly action: FormAction | null;
}

const percentOf = (fraction: number): number => Number((100 * fraction).toPrecision(12));

/** The growth allowance of every maturity. */
export function AllowanceTable({ allowances, program, action }: AllowanceTableProps) {
  return (
    <Table caption="Growth allowances" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Maturity of the row</ColumnHead>
          <ColumnHead side="right" unit="%">
            Allowance
          </ColumnHead>
          <ColumnHead>Source</ColumnHead>
          {action ? (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {MATURITIES.map((maturity) => {
          const known = allowances.find((one) => one.maturity === maturity);
          const present: Record<string, string> = known
            ? { percent: String(percentOf(known.fraction)), source: known.source }
            : {};
          return (
            <tr key={maturity}>
              <RowHead>{MATURITY_WORDS[maturity]}</RowHead>
              <Cell side="right">
                {known ? <Num value={percentOf(known.fraction)} decimals={1} /> : 'not set'}
              </Cell>
              <Cell>{known?.source}</Cell>
              {action ? (
                <Cell>
                  <span className="-my-1.5 flex pointer-coarse:-my-3">
                    <DialogButton
                      words={known ? 'Change allowance' : 'Set allowance'}
                      kind="quiet"
                      title={`Growth allowance: ${MATURITY_WORDS[maturity]}`}
                    >
                      <AllowanceForm {...{ action, program, maturity, present }} />
                    </DialogButton>
                  </span>
                </Cell>
              ) : null}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
