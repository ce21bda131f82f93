import { type Moments } from '@/lib/frames/products';
import { fromSi } from '@/lib/units/convert';
import { type InertiaUnit } from '@/lib/units/table';

export type TensorView = 'elements' | 'products';

/** The axes a tensor is written in, each with the direction it points to. */
export interface NamedAxes {
  readonly x: string;
  readonly y: string;
  readonly z: string;
}

export const BODY_AXES: NamedAxes = { x: 'forward', y: 'right', z: 'down' };

export const CONVENTION: Record<TensorView, string> = {
  elements: 'Tensor elements: off-diagonals are minus the products.',
  products: 'Products: positive integrals, Ixy is the integral of x y dm.',
};

export interface TensorCell {
  /** `Ixx`, or `Ixy` of which an off-diagonal is the negative. */
  readonly symbol: keyof Moments;
  readonly diagonal: boolean;
  /** In the unit asked for; as an element of the tensor or as a product, by the view. */
  readonly value: number;
}

const ROWS: readonly (readonly (keyof Moments)[])[] = [
  ['ixx', 'ixy', 'ixz'],
  ['ixy', 'iyy', 'iyz'],
  ['ixz', 'iyz', 'izz'],
];

/** The nine elements of the tensor, row by row: off-diagonals are minus the products. */
export function tensorElements(moments: Moments, unit: InertiaUnit): readonly (readonly TensorCell[])[] {
  return ROWS.map((row, i) =>
    row.map((symbol, j) => {
      const product = fromSi(moments[symbol], unit);
      return { symbol, diagonal: i === j, value: i === j ? product : negative(product) };
    }),
  );
}

/** Minus a number, without making a minus zero. */
function negative(value: number): number {
  return value === 0 ? 0 : -value;
}

/** What "copy" puts on the clipboard: the convention, then tab-separated values in full precision. */
export function tensorTsv(
  moments: Moments,
  unit: InertiaUnit,
  view: TensorView,
  title: string,
  axes: NamedAxes,
): string {
  const head = `${title}; x ${axes.x}, y ${axes.y}, z ${axes.z}; ${unit}. ${CONVENTION[view]}`;
  const rows =
    view === 'elements'
      ? tensorElements(moments, unit).map((row) => row.map((cell) => String(cell.value)).join('\t'))
      : PRODUCT_ORDER.map((symbol) => `${symbol}\t${fromSi(moments[symbol], unit)}`);
  return [head, ...rows].join('\n');
}

export const PRODUCT_ORDER: readonly (keyof Moments)[] = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'];
