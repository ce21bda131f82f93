import { TRAITS } from '../columns/traits';
import { type RowRule } from '../rule';
import { FIRST_ROWS, counted, eachRow } from '../watch';

export const unknownGroup: RowRule = {
  id: 'unknown-group',
  severity: 'warning',
  sees: 'A counted row whose group the breakdown of the program does not have, by any name it has had.',
  why: 'Its mass stands in a group of its own beside the one it was meant for, and no allowance, limit or comparison of that group sees it.',
  remedy: 'Correct the group of the row, or add the group to the breakdown in the settings.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ isCounted, component: { group } }, { groups }) =>
      isCounted && groups !== undefined && groups.isUnknown(group) ? `group ${group}` : null,
    (count) =>
      counted(
        count,
        'row is in a group that the breakdown does not have',
        'rows are in groups that the breakdown does not have',
      ),
    { traits: TRAITS.unknownGroup, isAll: true },
  ),
};
