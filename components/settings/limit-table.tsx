import { Num } from '@/components/mass/num';
import { typedDecimals } from '@/components/mass/number-text';
import { OneButtonForm } from '@/components/forms/one-button-form';
import { LimitForm } from '@/components/settings/limit-form';
import { LIMIT_KIND_WORDS, LIMIT_WORDS } from '@/components/settings/words';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { LIMIT_QUANTITIES, type LIMIT_KINDS } from '@/lib/contracts/program-settings';
import { type FormAction } from '@/lib/form-state';
import { asTyped } from '@/lib/units/convert';
import { type MassUnit } from '@/lib/units/table';

type Quantity = (typeof LIMIT_QUANTITIES)[number];

interface LimitLine {
  readonly quantity: Quantity;
  readonly kind: (typeof LIMIT_KINDS)[number];
  /** % MAC, or kg. */
  readonly value: number;
  readonly source: string;
  readonly source_date: string;
  readonly author: string;
}

interface LimitTableProps {
  readonly limits: readonly LimitLine[];
  readonly program: string;
  readonly massUnit: MassUnit;
  /** Null for those who may only look. */
  readonly actions: { readonly set: FormAction; readonly remove: FormAction } | null;
}

/** Every limit that a program can have, set or not. */
export function LimitTable({ limits, program, massUnit, actions }: LimitTableProps) {
  return (
    <Table caption="Limits" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Limit</ColumnHead>
          <ColumnHead side="right">Value</ColumnHead>
          <ColumnHead>Unit</ColumnHead>
          <ColumnHead>Kind</ColumnHead>
          <ColumnHead>Source</ColumnHead>
          <ColumnHead>Dated</ColumnHead>
          <ColumnHead>Set by</ColumnHead>
          {actions ? (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {LIMIT_QUANTITIES.map((quantity) => {
          const limit = limits.find((one) => one.quantity === quantity);
          const isMass = quantity === 'mass-maximum';
          return (
            <tr key={quantity}>
              <RowHead>{LIMIT_WORDS[quantity]}</RowHead>
              <Cell side="right">
                {limit ? (
                  <Num
                    value={shownValue(limit, massUnit)}
                    decimals={Math.min(6, typedDecimals(shownValue(limit, massUnit)))}
                  />
                ) : (
                  'not set'
                )}
              </Cell>
              <Cell>{isMass ? massUnit : '% MAC'}</Cell>
              <Cell>{limit ? LIMIT_KIND_WORDS[limit.kind] : ''}</Cell>
              <Cell>{limit?.source}</Cell>
              <Cell className="num">{limit?.source_date}</Cell>
              <Cell>{limit?.author}</Cell>
              {actions ? (
                <Cell>
                  <Change {...{ quantity, limit, program, massUnit, actions }} />
                </Cell>
              ) : null}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

function Change({
  quantity,
  limit,
  program,
  massUnit,
  actions,
}: {
  readonly quantity: Quantity;
  readonly limit: LimitLine | undefined;
  readonly program: string;
  readonly massUnit: MassUnit;
  readonly actions: { readonly set: FormAction; readonly remove: FormAction };
}) {
  const title = LIMIT_WORDS[quantity];
  const present: Record<string, string> = limit
    ? {
        value: String(shownValue(limit, massUnit)),
        kind: limit.kind,
        source: limit.source,
        source_date: limit.source_date,
      }
    : {};
  return (
    <span className="-my-1.5 flex gap-4 pointer-coarse:-my-3">
      <DialogButton words={limit ? 'Change limit' : 'Set limit'} kind="quiet" title={title}>
        <LimitForm action={actions.set} {...{ program, quantity, massUnit, present }} />
      </DialogButton>
      {limit ? (
        <DialogButton words="Remove limit" kind="quiet" title={`Remove: ${title}?`} asks>
          <p className="measure">Results are no longer judged by it. The trail keeps what it was.</p>
          <OneButtonForm
            action={actions.remove}
            fields={{ program, quantity }}
            words="Remove limit"
            pendingWords="Removing"
            kind="danger"
          />
        </DialogButton>
      ) : null}
    </span>
  );
}

/** % MAC, or the mass in the unit that is shown, as it was entered. */
function shownValue({ quantity, value }: LimitLine, massUnit: MassUnit): number {
  return quantity === 'mass-maximum' ? asTyped(value, massUnit) : value;
}
