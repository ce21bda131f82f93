import { momentsOf } from '@/lib/frames/products';
import { type Component } from '@/lib/mass/component';
import { type ListPose } from '@/lib/mass/declarations';
import { Placement } from '@/lib/mass/place';
import { type MassResult } from '@/lib/mass/result';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { congruence, normSym, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { aComponent, declarations, geometry, properties } from './mass';
import { randomNumbers } from './random';
import { Rational, ZERO } from './rational';

export interface RandomRows {
  readonly datum?: Vec3;
  /** Masses are 10 to a power between these two, evenly spread. */
  readonly decades?: readonly [number, number];
  /** Point masses: no own tensors, the hardest case where one mass outweighs all others. */
  readonly points?: boolean;
  /** A tenth of the rows take something away. */
  readonly removals?: boolean;
}

/** Rows of an aircraft 40 m long, some of them several pieces. */
export function randomRows(
  count: number,
  seed: number,
  { datum = [0, 0, 0], decades = [-2, 3], points = false, removals = true }: RandomRows = {},
): Component[] {
  const random = randomNumbers(seed);
  const between = (low: number, high: number): number => low + (high - low) * random();
  return Array.from({ length: count }, (_, i) => {
    const size = between(0.01, 2);
    const edge = (): Vec3 => [between(-size, size), between(-size, size), between(-size, size)];
    const mass = 10 ** between(...decades);
    const sign = removals && i > 0 && random() < 0.1 ? -1 : 1;
    const k = points ? 0 : sign * mass;
    const second = congruence([edge(), edge(), edge()], { xx: k, yy: k, zz: k, xy: 0, xz: 0, yz: 0 });
    return aComponent({
      item: `row ${i}`,
      mass: sign * mass * (sign < 0 ? 0.1 : 1),
      quantity: 1 + Math.floor(random() * 4),
      position: [datum[0] + between(-20, 20), datum[1] + between(-15, 15), datum[2] + between(-3, 3)],
      moments: momentsOf(traceMinus(second)),
    });
  });
}

/** Rows as the accuracy target names them: masses from 1e-6 to 1e5 kg. */
export const elevenDecades: RandomRows = { decades: [-6, 5], removals: false };

type Six = readonly [Rational, Rational, Rational, Rational, Rational, Rational];

/** Place of a row in the airframe, exactly. */
export type ExactPlace = (row: Component) => readonly [Rational, Rational, Rational];

export const asStated: ExactPlace = ({ position: [x, y, z] }) => [
  Rational.of(x),
  Rational.of(y),
  Rational.of(z),
];

/** Mass, CG and tensor about the CG (elements xx yy zz xy xz yz) in exact arithmetic, straight from the definition. */
export function exactly(
  rows: readonly Component[],
  placeOf: ExactPlace = asStated,
): { mass: Rational; cg: readonly Rational[]; tensor: Six } {
  const sum = (terms: readonly Rational[]): Rational => terms.reduce((a, b) => a.plus(b), ZERO);
  const bodies = rows.map((row) => ({
    row,
    pieces: Rational.of(row.quantity),
    mass: Rational.of(row.mass).times(Rational.of(row.quantity)),
    place: placeOf(row),
  }));
  const mass = sum(bodies.map((body) => body.mass));
  const mean = (k: 0 | 1 | 2): Rational => sum(bodies.map((body) => body.mass.times(body.place[k])));
  const moment = [mean(0), mean(1), mean(2)] as const;
  const about = (i: 0 | 1 | 2, j: 0 | 1 | 2): Rational =>
    sum(bodies.map((body) => body.mass.times(body.place[i]).times(body.place[j]))).minus(
      moment[i].times(moment[j]).over(mass),
    );
  const own = (key: keyof Component['moments']): Rational =>
    sum(bodies.map(({ row, pieces }) => pieces.times(Rational.of(row.moments[key]))));
  const [xx, yy, zz] = [about(0, 0), about(1, 1), about(2, 2)];
  return {
    mass,
    cg: moment.map((part) => part.over(mass)),
    tensor: [
      own('ixx').plus(yy).plus(zz),
      own('iyy').plus(xx).plus(zz),
      own('izz').plus(xx).plus(yy),
      own('ixy').plus(about(0, 1)).negative(),
      own('ixz').plus(about(0, 2)).negative(),
      own('iyz').plus(about(1, 2)).negative(),
    ],
  };
}

/** Errors against exact arithmetic: of mass, of the tensor (norm-wise, a share of it), and of the CG in metres. */
export function errors(
  result: MassResult,
  rows: readonly Component[],
  placeOf: ExactPlace = asStated,
): { mass: number; tensor: number; cg: number } {
  const exact = exactly(rows, placeOf);
  const { cg, tensor } = properties(result);
  const off = (value: number, truth: Rational): number => Rational.of(value).minus(truth).toNumber();
  const { xx, yy, zz, xy, xz, yz } = tensor;
  const differences = [xx, yy, zz, xy, xz, yz].map((value, k) => off(value, exact.tensor[k] ?? ZERO));
  const norm = (six: readonly number[]): number =>
    Math.hypot(...six.slice(0, 3), ...six.slice(3).map((part) => Math.SQRT2 * part));
  return {
    mass: Math.abs(off(result.mass, exact.mass)) / Math.abs(exact.mass.toNumber()),
    tensor: norm(differences) / norm(exact.tensor.map((part) => part.toNumber())),
    cg: Math.hypot(...cg.map((part, k) => off(part, exact.cg[k] ?? ZERO))),
  };
}

export function bookedAbout(rows: readonly Component[], reference: Vec3, pose?: ListPose): MassResult {
  const frame = geometry({ reference });
  const list = pose === undefined ? declarations() : declarations({ pose });
  const book = new SubtotalBook(new Placement(list, frame));
  for (const row of rows) book.add(row);
  return rollUp(book.subtotals(), [], frame, NO_GROWTH).basic;
}

/**
 * What rounding of the coordinates alone, as they are stated, does to the tensor of these rows: root mean square as a share of its
 * Frobenius norm. Each coordinate is off by an even spread over half a unit in its last place, u, so by s = u/√3 one σ; a piece of
 * mass m at d from the CG then changes J by 12 m² s² d² in the mean square (J = tr(S) 1 - S, δS = m (δ dᵀ + d δᵀ)).
 */
export function roundingOfCoordinates(rows: readonly Component[], result: MassResult): number {
  const { cg, tensor } = properties(result);
  const ulp = (x: number): number => 2 ** (Math.floor(Math.log2(Math.abs(x) || Number.MIN_VALUE)) - 52);
  const square = rows.reduce((sum, { mass, quantity, position }) => {
    const d = Math.hypot(position[0] - cg[0], position[1] - cg[1], position[2] - cg[2]);
    const s = ulp(Math.max(...position.map(Math.abs))) / 2 / Math.sqrt(3);
    return sum + 12 * (mass * quantity * s * d) ** 2;
  }, 0);
  return Math.sqrt(square) / normSym(tensor);
}
