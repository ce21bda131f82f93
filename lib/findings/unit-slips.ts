import { FACTORS, type Unit } from '@/lib/units/table';

/** A unit that would explain a ratio of stated over expected. */
export interface UnitSlip<U extends Unit> {
  readonly unit: U;
  /** False: the figures are in `unit`, not in the declared one. True: they were converted from `unit` once too often. */
  readonly isTwice: boolean;
  /** Stated over expected, from the factor table. */
  readonly factor: number;
  /** The unit that the figures were taken for on their way to the declared one; absent where that is the declared one. */
  readonly takenFor?: U;
}

const si = (unit: Unit): number => FACTORS[unit].times / FACTORS[unit].over;

/**
 * The ways in which a figure stated in `declared` can be off by a unit of the same kind, each with its factor: lb for kg 2.2046,
 * in for mm 25.4, lb.in2 for lb.ft2 144, lb.in2 for slug.ft2 4633.06 and so on. Factors nearer to 1 than `least` are left
 * out. The likeliest first: a unit mistaken for the declared one before a conversion made twice, small factors before large ones.
 */
export function unitSlips<U extends Unit>(declared: U, units: readonly U[], least = 1.5): UnitSlip<U>[] {
  const away = ({ factor }: UnitSlip<U>): number => Math.abs(Math.log(factor));
  const once = units
    .map((unit): UnitSlip<U> => ({ unit, isTwice: false, factor: si(declared) / si(unit) }))
    .filter((slip) => away(slip) >= Math.log(least))
    .sort((a, b) => away(a) - away(b));
  return [...once, ...once.map(({ unit, factor }) => ({ unit, isTwice: true, factor: 1 / factor }))];
}

/** Units that are exchanged before a list's own unit comes into play, by a supplier who converts: 32.174, 144, 12, 4633.06; 25.4. */
const EXCHANGED: readonly (readonly [Unit, Unit])[] = [
  ['slug', 'lb'],
  ['in', 'mm'],
  ['ft', 'in'],
  ['slug.ft2', 'lb.ft2'],
  ['lb.ft2', 'lb.in2'],
  ['slug.ft2', 'lbf.in.s2'],
  ['slug.ft2', 'lb.in2'],
];

/**
 * `unitSlips` and, after them, the usual exchanges of two units neither of which is `declared`. For figures that are known to
 * belong together within a fraction of a per cent: so many factors explain a looser ratio by chance.
 */
export function slipsOfOneThing<U extends Unit>(
  declared: U,
  units: readonly U[],
  least?: number,
): UnitSlip<U>[] {
  const isOurs = (unit: Unit): unit is U => units.some((one) => one === unit);
  const others = EXCHANGED.flatMap(([a, b]): UnitSlip<U>[] => {
    if (!isOurs(a) || !isOurs(b) || a === declared || b === declared) return [];
    return [
      { unit: a, takenFor: b, isTwice: false, factor: si(b) / si(a) },
      { unit: b, takenFor: a, isTwice: false, factor: si(a) / si(b) },
    ];
  });
  return [...unitSlips(declared, units, least), ...others];
}

/** The slip whose factor is within `tolerance` (a share) of the ratio stated over expected; null when there is none. */
export function slipAt<U extends Unit>(
  ratio: number,
  slips: readonly UnitSlip<U>[],
  tolerance: number,
): UnitSlip<U> | null {
  return slips.find(({ factor }) => Math.abs(ratio / factor - 1) <= tolerance) ?? null;
}

/** `as if in lb.in2`, `as if converted from lb.in2 once too often` or `as if slug.ft2 had been taken for lb.ft2`. */
export function slipWords({ unit, isTwice, takenFor }: UnitSlip<Unit>): string {
  if (takenFor !== undefined) return `as if ${unit} had been taken for ${takenFor}`;
  return isTwice ? `as if converted from ${unit} once too often` : `as if in ${unit}`;
}

/** Which of two figures for one thing, stated as `ratio` = now over before, is in another unit than declared; null when neither is. */
export function slipOfTwo<U extends Unit>(
  ratio: number,
  slips: readonly UnitSlip<U>[],
  tolerance: number,
): { readonly of: 'now' | 'before'; readonly slip: UnitSlip<U> } | null {
  const once = slips.filter(({ isTwice }) => !isTwice);
  const ofNow = slipAt(ratio, once, tolerance);
  if (ofNow !== null) return { of: 'now', slip: ofNow };
  const ofBefore = slipAt(1 / ratio, once, tolerance);
  return ofBefore === null ? null : { of: 'before', slip: ofBefore };
}
