import { type Account, addAccounts, readAccount } from '@/lib/mass/account';
import { checkSecondMoment } from '@/lib/mass/physical';
import { normVec } from '@/lib/numerics/vec3';

import { bothUnits } from '../both-units';
import { type Finding, ROWS_NAMED } from '../finding';
import { type Rule, type Sighting } from '../rule';
import { counted, shown } from '../watch';
import { type BookedRow, type Removal } from './removal';

/** A rule on the removals of one list of adjustments against the rows of the other lists of a configuration. */
export interface RemovalRule extends Rule {
  readonly look: (removals: readonly Removal[]) => Sighting | null;
}

function sighting(
  found: readonly { readonly removal: BookedRow; readonly detail: string }[],
  headline: (count: number) => string,
): Sighting | null {
  const [first] = found;
  if (first === undefined) return null;
  return {
    message: `${headline(found.length)}. First, ${first.removal.name}: ${first.detail}.`,
    rows: found.slice(0, ROWS_NAMED).map(({ removal }) => removal.name),
    count: found.length,
  };
}

/** Growth is stated to a tenth of a per cent at best. */
const SAME_GROWTH = 1e-6;

const percent = (fraction: number): string => `${shown(100 * fraction)} %`;

export const removalGrowth: RemovalRule = {
  id: 'removal-growth-differs',
  severity: 'warning',
  sees: 'A removal whose growth, stated or allowed for its maturity, is not that of the row that it takes away.',
  why: 'In predicted mass the row counts with its growth and the removal with another: a piece of a part that is no longer there stays in the prediction, or too much goes.',
  remedy: 'Give the removal the growth_percent and the maturity of the row that it takes away.',
  source: 'First principles: k (m, p, Q) scales each row by its own growth',
  look: (removals) =>
    sighting(
      removals.flatMap(({ removal, from }) =>
        from === null || Math.abs(removal.growth - from.growth) <= SAME_GROWTH
          ? []
          : [{ removal, detail: `growth ${percent(removal.growth)}, ${from.name} ${percent(from.growth)}` }],
      ),
      (count) =>
        counted(
          count,
          'removal grows otherwise than the row it takes away',
          'removals grow otherwise than the rows they take away',
        ),
    ),
};

/** Figures of removal and row may be rounded by this share. */
const ROUNDED = 1e-3;
/** A residue of the whole mass is at the place of the row within this, m. */
const SAME_PLACE = 0.005;

/** What is wrong with what a removal leaves of its row, or null. */
function residue({ removal, from }: { removal: BookedRow; from: BookedRow }): string | null {
  const before: Account = from.account;
  if (!(before.mass > 0)) return null;
  const after = addAccounts(before, removal.account);
  const taken = before.mass - after.mass;
  if (after.mass < -ROUNDED * before.mass)
    return `takes ${bothUnits(taken, 'kg')} of ${from.name}, which has ${bothUnits(before.mass, 'kg')}`;
  if (after.mass <= ROUNDED * before.mass) {
    const offset = normVec(after.first) / before.mass;
    return offset > SAME_PLACE
      ? `takes all of ${from.name} from a place ${bothUnits(offset, 'm')} away`
      : null;
  }
  const left = readAccount(after);
  return left !== null && checkSecondMoment(left.second).verdict === 'impossible'
    ? `what is left of ${from.name} cannot be: its place or its moments are not those of a part of it`
    : null;
}

export const removalExceeds: RemovalRule = {
  id: 'removal-exceeds-row',
  severity: 'warning',
  sees: 'A removal that takes more mass than the row of its item or part number has, takes all of it from another place, or leaves of it what no body can be.',
  why: 'What is removed must be what is there. A rest that cannot be stays in every total, where a large aircraft hides it.',
  remedy:
    'Copy mass, place and moments of the removal from the row that it takes away, both with a minus sign.',
  source: 'First principles: what remains of a body after a removal is a body',
  look: (removals) =>
    sighting(
      removals.flatMap(({ removal, from }) => {
        const detail = from === null ? null : residue({ removal, from });
        return detail === null ? [] : [{ removal, detail }];
      }),
      (count) =>
        counted(
          count,
          'removal does not fit the row it takes away',
          'removals do not fit the rows they take away',
        ),
    ),
};

export const removalOfNothing: RemovalRule = {
  id: 'removal-without-row',
  severity: 'note',
  sees: 'A removal whose item and part number no counted row of the other lists has.',
  why: 'It may take away what these lists do not hold, or what they hold under another number: nobody can hold it against a row.',
  remedy: 'Give the removal the part number of the row that it takes away.',
  source: 'Common practice, no source',
  look: (removals) =>
    sighting(
      removals.flatMap(({ removal, from }) =>
        from === null ? [{ removal, detail: bothUnits(removal.account.mass, 'kg') }] : [],
      ),
      (count) => counted(count, 'removal names no row that is there', 'removals name no rows that are there'),
    ),
};

export const REMOVAL_RULES: readonly RemovalRule[] = [removalExceeds, removalGrowth, removalOfNothing];

/** Findings on the removals of one list: warnings first. */
export function findingsOnRemovals(removals: readonly Removal[]): Finding[] {
  return REMOVAL_RULES.flatMap(({ id, severity, look }) => {
    const seen = look(removals);
    return seen === null ? [] : [{ rule: id, severity, ...seen }];
  });
}
