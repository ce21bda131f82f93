import { type ListColumn, CHANGE_COLUMNS } from '@/lib/ingest/mass-list/columns';
import { CATEGORIES, CHANGE_STATUSES, MATURITIES } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';

export interface RowField {
  readonly column: ListColumn;
  readonly label: string;
  readonly kind: 'text' | 'number' | 'choice';
  readonly unit?: string;
  readonly choices?: readonly string[];
  /** What a blank cell stands for. */
  readonly blank?: string;
}

export interface RowFieldGroup {
  readonly title: string;
  readonly fields: readonly RowField[];
}

/** Every field of a row in the order in which it is read, with the list's units and axes. */
export function rowFieldGroups(declarations: ListDeclarations): readonly RowFieldGroup[] {
  const { massUnit, lengthUnit, inertiaUnit, axes, kind } = declarations;
  const [mass, length, inertia] = [unitLabel(massUnit), unitLabel(lengthUnit), unitLabel(inertiaUnit)];
  const text = (column: ListColumn, label: string, blank?: string): RowField => ({
    column,
    label,
    kind: 'text',
    ...(blank === undefined ? {} : { blank }),
  });
  const number = (column: ListColumn, label: string, unit = '', blank = ''): RowField => ({
    column,
    label,
    kind: 'number',
    ...(unit === '' ? {} : { unit }),
    ...(blank === '' ? {} : { blank }),
  });
  const choice = (
    column: ListColumn,
    label: string,
    choices: readonly string[],
    blank: string,
  ): RowField => ({
    column,
    label,
    kind: 'choice',
    choices,
    blank,
  });
  const groups: RowFieldGroup[] = [
    {
      title: 'What it is',
      fields: [
        text('item', 'Item'),
        text('description', 'Description'),
        text('part_number', 'Part number'),
        text('part_revision', 'Part revision'),
        text('group', 'Group', 'Ungrouped'),
        text('parent', 'Parent, the item of its assembly'),
        choice('category', 'Category', CATEGORIES, 'empty'),
        choice('counting', 'Counting', ['counted', 'memo'], 'counted'),
      ],
    },
    {
      title: 'Mass and place',
      fields: [
        number('quantity', 'Quantity', '', '1'),
        number('mass', 'Mass of one piece', mass),
        number('x', `x, ${axes[0]}`, length),
        number('y', `y, ${axes[1]}`, length),
        number('z', `z, ${axes[2]}`, length),
        choice('symmetry', 'Symmetry', ['pair'], 'none'),
      ],
    },
    {
      title: 'Inertia of one piece about its own CG, own axes',
      fields: (['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const).map((name) =>
        number(name, `I${name.slice(1)}`, inertia, '0'),
      ),
    },
    {
      title: 'Orientation of its own axes',
      fields: [
        number('yaw', 'Yaw', 'deg', '0'),
        number('pitch', 'Pitch', 'deg', '0'),
        number('roll', 'Roll', 'deg', '0'),
      ],
    },
    {
      title: 'Maturity and growth',
      fields: [
        choice('maturity', 'Maturity', MATURITIES, 'not stated'),
        number('growth_percent', 'Growth allowance', '%', 'by maturity'),
      ],
    },
    {
      title: 'Uncertainty',
      fields: [
        number('mass_sigma', 'Mass', mass),
        number('x_sigma', 'x', length),
        number('y_sigma', 'y', length),
        number('z_sigma', 'z', length),
        ...(['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const).map((name) =>
          number(`${name}_sigma`, `I${name.slice(1)}`, inertia),
        ),
      ],
    },
    {
      title: 'Evidence',
      fields: [text('source', 'Source'), text('source_date', 'Source date'), text('note', 'Note')],
    },
    {
      title: 'Change',
      fields: [
        text('change_ref', 'Change reference'),
        choice('status', 'Status', CHANGE_STATUSES, 'approved'),
      ],
    },
  ];
  const left: readonly ListColumn[] = kind === 'components' ? CHANGE_COLUMNS : [];
  return groups
    .map((group) => ({ ...group, fields: group.fields.filter(({ column }) => !left.includes(column)) }))
    .filter(({ fields }) => fields.length > 0);
}
