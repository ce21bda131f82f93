import Link from 'next/link';
import { type ProgramLimits } from '@/components/configurations/condition-result';
import { balanceVerdict } from '@/components/mass/balance-scale';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { InertiaSymbol } from '@/components/mass/tensor-plate';
import { SeverityMark } from '@/components/ui/severity';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { LINK_CLASS } from '@/components/ui/text-link';
import { type ConditionResult } from '@/lib/loading/configuration';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits, unitLabel } from '@/lib/units/names';

interface ConditionTableProps {
  readonly conditions: readonly (Pick<ConditionResult, 'code' | 'title' | 'rollUp'> & {
    readonly href: string;
  })[];
  /** Code of the condition that the page shows in full. */
  readonly shown: string;
  readonly units: OutputUnits;
  readonly limitsOf: (condition: string) => Limits;
}

type Limits = Pick<ProgramLimits, 'forward' | 'aft'>;

const SHOWN = ['ixx', 'iyy', 'izz', 'ixz'] as const;

/** The conditions beside each other; each leads to its page. */
export function ConditionTable({ conditions, shown, units, limitsOf }: ConditionTableProps) {
  const masses = conditions.map(({ rollUp }) => fromSi(rollUp.basic.mass, units.mass));
  const moments = conditions.flatMap(({ rollUp }) =>
    SHOWN.map((name) => fromSi(rollUp.basic.properties?.inertia[name] ?? 0, units.inertia)),
  );
  const [massDecimals, decimals] = [sharedDecimals(masses), sharedDecimals(moments)];
  return (
    <Table caption="Conditions: CG behind the leading edge of the mean chord, inertia about the CG in body axes, products as positive integrals">
      <thead>
        <tr>
          <ColumnHead>Condition</ColumnHead>
          <ColumnHead side="right" unit={units.mass}>
            Basic mass
          </ColumnHead>
          <ColumnHead side="right" unit={units.mass}>
            Predicted
          </ColumnHead>
          <ColumnHead side="right" unit="% MAC">
            CG
          </ColumnHead>
          {SHOWN.map((symbol) => (
            <ColumnHead key={symbol} side="right" unit={unitLabel(units.inertia)}>
              <InertiaSymbol symbol={symbol} />
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {conditions.map(({ code, title, rollUp, href }) => (
          <tr key={code}>
            <RowHead>
              <Link
                href={href}
                scroll={false}
                aria-current={code === shown ? 'page' : undefined}
                className={code === shown ? 'font-semibold' : LINK_CLASS}
              >
                {title}
              </Link>
            </RowHead>
            <Cell side="right">
              <Num value={rollUp.basic.mass} unit={units.mass} decimals={massDecimals} />
            </Cell>
            <Cell side="right">
              <Num value={rollUp.predicted.mass} unit={units.mass} decimals={massDecimals} />
            </Cell>
            <Cell side="right">
              <BalanceFigure cg={rollUp.basic.properties?.percentMac ?? null} limits={limitsOf(code)} />
            </Cell>
            {SHOWN.map((symbol) => (
              <Cell key={symbol} side="right">
                <Num
                  value={rollUp.basic.properties?.inertia[symbol] ?? null}
                  unit={units.inertia}
                  decimals={decimals}
                  plus={symbol === 'ixz'}
                />
              </Cell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

/** % MAC; beyond a limit with its mark, and in words for whoever does not see it. */
function BalanceFigure({ cg, limits }: { readonly cg: number | null; readonly limits: Limits }) {
  const verdict = cg === null ? null : balanceVerdict(cg, limits.forward, limits.aft);
  if (verdict === null || verdict.inside) return <Num value={cg} decimals={2} />;
  return (
    <span className="inline-flex items-center gap-1.5 text-limit" title={`${verdict.words}.`}>
      <SeverityMark severity="blocker" />
      <Num value={cg} decimals={2} />
      <span className="sr-only">outside the limits</span>
    </span>
  );
}
