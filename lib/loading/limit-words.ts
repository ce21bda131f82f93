import { type Limit, type LimitQuantity } from './limits';

/** What a limited quantity is called, in the middle of a sentence. */
export const QUANTITY_WORDS: Readonly<Record<LimitQuantity, string>> = {
  mass: 'mass',
  percentMac: 'CG in % MAC',
  cgx: 'CG x',
  cgy: 'CG y',
  cgz: 'CG z',
  ixx: 'Ixx',
  iyy: 'Iyy',
  izz: 'Izz',
  ixy: 'product Ixy',
  ixz: 'product Ixz',
  iyz: 'product Iyz',
};

/** The SI unit that a limit and its margin are in; `%` of the mean chord for `percentMac`. */
export function siUnit(quantity: LimitQuantity): 'kg' | 'm' | 'kg.m2' | '% MAC' {
  if (quantity === 'mass') return 'kg';
  if (quantity === 'percentMac') return '% MAC';
  return quantity.startsWith('cg') ? 'm' : 'kg.m2';
}

/** `mass of Wing, at most`: which figure a limit is about, and from which side. */
export function limitName({ quantity, group, sense }: Pick<Limit, 'quantity' | 'group' | 'sense'>): string {
  const of = group === '' ? '' : ` of ${group}`;
  return `${QUANTITY_WORDS[quantity]}${of}, ${sense === 'at-most' ? 'at most' : 'at least'}`;
}
