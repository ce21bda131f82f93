import { OneButtonForm } from '@/components/forms/one-button-form';
import { Num } from '@/components/mass/num';
import { AllowanceForm } from '@/components/settings/allowance-form';
import { Indent } from '@/components/settings/indent';
import { MATURITY_WORDS } from '@/components/settings/words';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';
import { groupName } from '@/lib/groups/breakdown';
import { allowanceFor } from '@/lib/mass/allowances';
import { MATURITIES, type Maturity } from '@/lib/mass/component';
import { type GrowthAllowances } from '@/lib/mass/roll-up';

interface AllowanceRule {
  /** By the name of today; '' for the program's own. */
  readonly group: string;
  readonly maturity: Maturity;
  readonly source: string;
}

interface AllowanceTableProps {
  readonly allowances: GrowthAllowances;
  /** Those that are set, with their sources. */
  readonly rules: readonly AllowanceRule[];
  /** Every group that there is. */
  readonly groups: readonly string[];
  readonly program: string;
  /** Null for those who may only look. */
  readonly actions: { readonly set: FormAction; readonly remove: FormAction } | null;
}

/** The growth allowance that applies in every group, by maturity, and the rule that gives it. */
export function AllowanceTable({ allowances, rules, groups, program, actions }: AllowanceTableProps) {
  const ruleOf = (group: string, maturity: Maturity) =>
    rules.find((rule) => rule.group === group && rule.maturity === maturity);
  return (
    <Table caption="Growth allowances by group and maturity, % of the mass" captionHidden tall>
      <thead>
        <tr>
          <ColumnHead>Group</ColumnHead>
          {MATURITIES.map((maturity) => (
            <ColumnHead key={maturity} unit="%">
              {MATURITY_WORDS[maturity]}
            </ColumnHead>
          ))}
          <ColumnHead>Source</ColumnHead>
          {actions ? (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {['', ...groups].map((group) => {
          const own = MATURITIES.flatMap((maturity) => ruleOf(group, maturity) ?? []);
          const title = group === '' ? 'The program’s own' : group;
          return (
            <tr key={group}>
              <RowHead>
                {group === '' ? null : <Indent path={group} />}
                {group === '' ? title : groupName(group)}
              </RowHead>
              {MATURITIES.map((maturity) => {
                const { fraction, from } = allowanceFor(allowances, group, maturity);
                return (
                  <Cell key={maturity}>
                    <Applied
                      percent={Number((100 * fraction).toPrecision(12))}
                      rule={ruleOf(from ?? '', maturity) === undefined ? null : from}
                      group={group}
                    />
                  </Cell>
                );
              })}
              <Cell>{[...new Set(own.map(({ source }) => source))].join('; ')}</Cell>
              {actions ? (
                <Cell>
                  <span className="-my-1.5 flex pointer-coarse:-my-3">
                    <DialogButton words="Set" kind="quiet" title={`Growth allowance: ${title}`}>
                      <div className="grid gap-4">
                        <AllowanceForm action={actions.set} {...{ program, group }} />
                        {own.map(({ maturity }) => (
                          <OneButtonForm
                            key={maturity}
                            action={actions.remove}
                            fields={{ program, group, maturity }}
                            words={`Remove the allowance of ${maturity}`}
                            pendingWords="Removing"
                          />
                        ))}
                      </div>
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

/** A figure of the group's own stands out; another says whose it is. */
function Applied({
  percent,
  rule,
  group,
}: {
  readonly percent: number;
  readonly rule: string | null;
  readonly group: string;
}) {
  if (rule === null) return <span className="text-ink-2">not set</span>;
  if (rule === group)
    return (
      <span className="font-semibold">
        <Num value={percent} decimals={1} />
      </span>
    );
  return (
    <span className="text-ink-2">
      <Num value={percent} decimals={1} />{' '}
      <span className="text-note">from {rule === '' ? 'the program' : rule}</span>
    </span>
  );
}
