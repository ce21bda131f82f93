import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type GroupChange } from '@/lib/baselines/compare';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type MassUnit } from '@/lib/units/table';

interface GroupChangeTableProps {
  /** The largest change first. */
  readonly groups: readonly GroupChange[];
  readonly unit: MassUnit;
  /** The rows behind a group's change; null for those who may not see rows. */
  readonly rowsHref: ((group: string) => string) | null;
  /** The account that shows every group. */
  readonly accountHref: string | null;
}

const SHOWN = 12;

/** The groups whose mass changed, the largest change first. */
export function GroupChangeTable({ groups, unit, rowsHref, accountHref }: GroupChangeTableProps) {
  if (groups.length === 0) return <p className="text-ink-2">No group changed its mass.</p>;
  const shown = groups.slice(0, SHOWN).map(({ group, mass }) => ({
    group,
    delta: fromSi((mass.after ?? 0) - (mass.before ?? 0), unit),
    how: mass.before === null ? 'new' : mass.after === null ? 'gone' : null,
  }));
  const decimals = decimalsFor(Math.max(...shown.map(({ delta }) => Math.abs(delta))), 5);
  return (
    <div className="grid gap-2">
      <Table caption="Change of mass by group" captionHidden>
        <thead>
          <tr>
            <ColumnHead>Group</ColumnHead>
            <ColumnHead side="right" unit={unitLabel(unit)}>
              Change
            </ColumnHead>
          </tr>
        </thead>
        <tbody>
          {shown.map(({ group, delta, how }) => (
            <tr key={group}>
              <RowHead>
                {rowsHref === null ? group : <TextLink href={rowsHref(group)}>{group}</TextLink>}
                {how === null ? null : <span className="text-ink-2"> {how}</span>}
              </RowHead>
              <Cell side="right">
                <Num value={delta} decimals={decimals} plus />
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
      {accountHref === null ? null : (
        <p>
          {groups.length > SHOWN ? `${groups.length - SHOWN} more groups changed. ` : null}
          <TextLink href={accountHref}>Mass account by group</TextLink>
        </p>
      )}
    </div>
  );
}
