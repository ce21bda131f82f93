import { TRAITS } from '../columns/traits';
import { type RowRule } from '../rule';
import { FIRST_ROWS, counted, eachRow } from '../watch';

export const memoRows: RowRule = {
  id: 'memo-rows',
  severity: 'note',
  sees: 'A row that is shown and not summed.',
  why: 'Assembly totals and superseded children must not be counted twice; a part marked memo by mistake is missing from every result.',
  remedy: 'Check that each of them is an assembly total or is counted through its parent.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ component }) => {
      if (component.counting !== 'memo') return null;
      return component.parent === null ? 'memo' : `memo, parent ${component.parent}`;
    },
    (count) => counted(count, 'memo row is not summed', 'memo rows are not summed'),
    { traits: TRAITS.memo, isAll: true },
  ),
};

export const pairInHalfList: RowRule = {
  id: 'pair-in-half-list',
  severity: 'warning',
  sees: 'A row marked as a pair in a list of one half.',
  why: 'Every row of a half list already stands for its mirror image. The row is counted with one image, not with three.',
  remedy: 'Clear the symmetry column, or declare the extent of the list as whole.',
  source: 'First principles',
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ component, declarations }) =>
      component.pair && declarations.extent !== 'whole' ? `pair in a ${declarations.extent} list` : null,
    (count) =>
      counted(
        count,
        'row is marked as a pair in a list of one half',
        'rows are marked as pairs in a list of one half',
      ),
    { traits: TRAITS.pair },
  ),
};
