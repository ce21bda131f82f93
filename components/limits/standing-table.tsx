import { unitOf } from '@/components/limits/figure';
import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { LIMIT_KIND_WORDS, LIMIT_QUANTITY_WORDS } from '@/components/settings/words';
import { SeverityWord } from '@/components/ui/severity';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { LIMIT_RULES } from '@/lib/findings/limits/rules';
import { type LimitStanding } from '@/lib/loading/limits';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits, unitLabel } from '@/lib/units/names';

interface StandingTableProps {
  readonly standings: readonly LimitStanding[];
  readonly units: OutputUnits;
  /** Where the components behind a figure are shown; '' is the whole aircraft. Null for those who may not see rows. */
  readonly rowsHref: ((condition: string, group: string) => string) | null;
}

/** Every limit and target against every condition it is about: basic, predicted, and the room left. */
export function StandingTable({ standings, units, rowsHref }: StandingTableProps) {
  if (standings.length === 0) return <p className="text-ink-2">No limit or target is in force.</p>;
  return (
    <Table caption="Room to each limit in its own unit: negative is beyond it. CG from the datum in airframe axes, inertia about the CG in body axes, products as positive integrals">
      <thead>
        <tr>
          <ColumnHead>Limit</ColumnHead>
          <ColumnHead>Unit</ColumnHead>
          <ColumnHead side="right">Allowed</ColumnHead>
          <ColumnHead side="right">Basic</ColumnHead>
          <ColumnHead side="right">Room</ColumnHead>
          <ColumnHead side="right">Predicted</ColumnHead>
          <ColumnHead side="right">Room</ColumnHead>
          <ColumnHead>Stands</ColumnHead>
          <ColumnHead>Kind and source</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {standings.map((standing, index) => (
          <Line key={index} {...{ standing, units, rowsHref }} />
        ))}
      </tbody>
    </Table>
  );
}

function Line({
  standing,
  units,
  rowsHref,
}: Omit<StandingTableProps, 'standings'> & { readonly standing: LimitStanding }) {
  const { limit, condition, basic, predicted, margin, verdict, obstacle } = standing;
  const unit = unitOf(limit.quantity, units);
  const shown = (value: number | null): number | null =>
    value === null || unit === null ? value : fromSi(value, unit);
  const decimals = Math.max(1, decimalsFor(shown(limit.value) ?? 0, 4));
  const about = `${limit.group === '' ? 'Whole aircraft' : limit.group}, ${condition.title}`;
  return (
    <tr>
      <RowHead>
        {LIMIT_QUANTITY_WORDS[limit.quantity]}
        <span className="block text-note text-ink-2">
          {rowsHref === null || verdict === 'no-condition' ? (
            about
          ) : (
            <TextLink href={rowsHref(condition.code, limit.group)}>{about}</TextLink>
          )}
        </span>
      </RowHead>
      <Cell className="whitespace-nowrap">{unit === null ? '% MAC' : unitLabel(unit)}</Cell>
      <Cell side="right">
        <span className="block text-note text-ink-2">
          {limit.sense === 'at-most' ? 'at most' : 'at least'}
        </span>
        <Num value={shown(limit.value)} decimals={decimals} />
      </Cell>
      {[basic, margin.basic, predicted, margin.predicted].map((value, column) => (
        <Cell
          key={column}
          side="right"
          className={column % 2 === 1 && value !== null && value < 0 ? 'text-limit' : undefined}
        >
          <Num value={shown(value)} decimals={decimals} plus={column % 2 === 1} />
        </Cell>
      ))}
      <Cell>
        <Stands {...{ standing }} />
        {obstacle === null ? null : <span className="block text-note text-ink-2">{obstacle}</span>}
      </Cell>
      <Cell>
        {LIMIT_KIND_WORDS[limit.kind]}
        <span className="block text-note text-ink-2">
          {limit.source}, <span className="num">{limit.sourceDate}</span>
        </span>
      </Cell>
    </tr>
  );
}

function Stands({ standing: { limit, verdict } }: { readonly standing: LimitStanding }) {
  const { severity } = LIMIT_RULES[limit.kind];
  if (verdict === 'beyond') return <SeverityWord severity={severity} word="Beyond" />;
  if (verdict === 'predicted-beyond')
    return <SeverityWord severity={severity} word="Beyond when predicted" />;
  if (verdict === 'within') return <SeverityWord severity="done" word="Within" />;
  return <span className="text-ink-2">Not judged</span>;
}
