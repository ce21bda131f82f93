import { OneButtonForm } from '@/components/forms/one-button-form';
import { limitFields, limitFigure } from '@/components/limits/figure';
import { Num } from '@/components/mass/num';
import { typedDecimals } from '@/components/mass/number-text';
import { type LimitChoices, LimitForm } from '@/components/settings/limit-form';
import { LIMIT_KIND_WORDS, LIMIT_QUANTITY_WORDS, LIMIT_SENSE_WORDS } from '@/components/settings/words';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';
import { inForce, type Limit } from '@/lib/loading/limits';
import { type OutputUnits } from '@/lib/units/names';

type LimitLine = Limit & { readonly id: string; readonly author: string };

interface LimitTableProps {
  readonly limits: readonly LimitLine[];
  /** ISO date: what is in force on it is marked. */
  readonly day: string;
  readonly program: string;
  readonly units: OutputUnits;
  readonly choices: LimitChoices;
  /** Null for those who may only look. */
  readonly actions: { readonly set: FormAction; readonly remove: FormAction } | null;
}

/** Every limit and target of a program, those too that are not in force. */
export function LimitTable({ limits, day, program, units, choices, actions }: LimitTableProps) {
  if (limits.length === 0)
    return <p className="text-ink-2">None is stated: results are judged by nothing.</p>;
  return (
    <Table caption="Limits and targets" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Limit</ColumnHead>
          <ColumnHead>Allowed</ColumnHead>
          <ColumnHead side="right">Value</ColumnHead>
          <ColumnHead>Unit</ColumnHead>
          <ColumnHead>Kind</ColumnHead>
          <ColumnHead>In force</ColumnHead>
          <ColumnHead>Source</ColumnHead>
          <ColumnHead>Set by</ColumnHead>
          {actions ? (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {limits.map((limit) => {
          const figure = limitFigure(limit, units);
          const isNow = inForce(limit, day);
          return (
            <tr key={limit.id} className={isNow ? undefined : 'text-ink-2'}>
              <RowHead>
                {LIMIT_QUANTITY_WORDS[limit.quantity]}
                <span className="block text-note text-ink-2">{aboutWords(limit, choices)}</span>
              </RowHead>
              <Cell>{LIMIT_SENSE_WORDS[limit.sense]}</Cell>
              <Cell side="right">
                <Num value={figure.value} decimals={Math.min(6, typedDecimals(figure.value))} />
              </Cell>
              <Cell>{figure.label}</Cell>
              <Cell>{LIMIT_KIND_WORDS[limit.kind]}</Cell>
              <Cell className="num">
                from {limit.from}
                {limit.until === null ? null : ` to ${limit.until}`}
                {isNow ? null : <span className="block text-note">not today</span>}
              </Cell>
              <Cell>
                {limit.source}, <span className="num">{limit.sourceDate}</span>
              </Cell>
              <Cell>{limit.author}</Cell>
              {actions ? (
                <Cell>
                  <Change {...{ limit, program, units, choices, actions }} />
                </Cell>
              ) : null}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

/** Of what and in which condition. */
function aboutWords({ group, condition, frameIssue }: Limit, { conditions }: LimitChoices): string {
  const of = group === '' ? 'Whole aircraft' : group;
  const title = conditions.find(({ code }) => code === condition)?.title ?? condition;
  const where = title === null ? 'every condition' : title;
  return `${of}, ${where}${frameIssue === null ? '' : `, frame issue ${frameIssue}`}`;
}

function Change({
  limit,
  program,
  units,
  choices,
  actions,
}: {
  readonly limit: LimitLine;
  readonly program: string;
  readonly units: OutputUnits;
  readonly choices: LimitChoices;
  readonly actions: { readonly set: FormAction; readonly remove: FormAction };
}) {
  const title = LIMIT_QUANTITY_WORDS[limit.quantity];
  return (
    <span className="-my-1.5 flex gap-4 pointer-coarse:-my-3">
      <DialogButton words="Change limit" kind="quiet" title={title}>
        <LimitForm action={actions.set} {...{ program, choices }} present={limitFields(limit, units)} />
      </DialogButton>
      <DialogButton words="Remove limit" kind="quiet" title={`Remove: ${title}?`} asks>
        <p className="measure">
          Results are no longer judged by it. The trail keeps what it was, and baselines that were signed
          under it keep it.
        </p>
        <OneButtonForm
          action={actions.remove}
          fields={{ program, id: limit.id }}
          words="Remove limit"
          pendingWords="Removing"
          kind="danger"
        />
      </DialogButton>
    </span>
  );
}
