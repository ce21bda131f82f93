import { type ListColumn } from '@/lib/ingest/mass-list/columns';

/** The contract's columns as a person chooses among them, by what they are about. */
export const COLUMN_GROUPS: readonly { readonly title: string; readonly columns: readonly ListColumn[] }[] = [
  {
    title: 'What it is',
    columns: [
      'item',
      'part_number',
      'part_revision',
      'description',
      'group',
      'category',
      'parent',
      'counting',
      'quantity',
    ],
  },
  { title: 'Mass and CG', columns: ['mass', 'x', 'y', 'z', 'maturity', 'growth_percent', 'symmetry'] },
  { title: 'Own inertia', columns: ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz', 'yaw', 'pitch', 'roll'] },
  {
    title: 'Uncertainty',
    columns: [
      'mass_sigma',
      'x_sigma',
      'y_sigma',
      'z_sigma',
      'ixx_sigma',
      'iyy_sigma',
      'izz_sigma',
      'ixy_sigma',
      'ixz_sigma',
      'iyz_sigma',
    ],
  },
  { title: 'Evidence', columns: ['source', 'source_date', 'note', 'change_ref', 'status'] },
];

const WORDS: Readonly<Partial<Record<ListColumn, string>>> = {
  item: 'item, the key of a row',
  mass: 'mass of a piece',
  x: 'x of the CG',
  y: 'y of the CG',
  z: 'z of the CG',
  symmetry: 'symmetry (pair)',
  growth_percent: 'growth allowance',
};

/** A column in words: `mass_sigma` as "mass sigma". */
export function columnWords(column: ListColumn): string {
  return WORDS[column] ?? column.replaceAll('_', ' ');
}
