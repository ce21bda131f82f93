import { type ListDeclarations } from '@/lib/mass/declarations';

interface NamedRows {
  /** Code of the program. */
  readonly program: string;
  /** Code of the list. */
  readonly list: string;
  readonly revision: number;
  /** Whether rows of the revision are left out. */
  readonly isPart: boolean;
  readonly declarations: Pick<
    ListDeclarations,
    'massUnit' | 'lengthUnit' | 'inertiaUnit' | 'products' | 'axes'
  >;
}

/** A name for exported rows that says what the columns of the contract leave to declarations: units, sign of products, axes. */
export function listFileName({ program, list, revision, isPart, declarations }: NamedRows): string {
  const { massUnit, lengthUnit, inertiaUnit, products, axes } = declarations;
  const what = `${program}-${list}-revision-${revision}${isPart ? '-part' : ''}`;
  return `${[what, massUnit, lengthUnit, inertiaUnit, `products-${products}`, axes.join('-')].join('_')}.csv`;
}
