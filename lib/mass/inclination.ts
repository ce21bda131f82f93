import { EQUAL_MOMENTS, type Principal, TIE, nearnessOf } from './principal';

/** The sign convention of `principalInclination`, to be shown with it. */
export const INCLINATION_SIGN = 'positive with the principal x axis above body x, nose up';

/**
 * Angle of the principal x axis from body x in the plane of symmetry, rad: positive when the principal axis points above body x
 * (nose up; body z is down). The trade's inclination of the principal axis.
 */
export function principalInclination({ axes }: Principal): number {
  const [x, , z] = axes[0];
  return Math.atan2(0 - z, x);
}

/** What a positive and a negative inclination are called. */
export const INCLINATION_SENSES = ['nose up', 'nose down'] as const;

/** The sign of an inclination in words; null where there is none. */
export function inclinationSense(angle: number): (typeof INCLINATION_SENSES)[number] | null {
  if (angle === 0) return null;
  return angle > 0 ? INCLINATION_SENSES[0] : INCLINATION_SENSES[1];
}

type BodyAxis = 'x' | 'y' | 'z';

/** Body axes that could change places without the pairing being any worse, and what was done about it. */
export interface PairingTie {
  readonly kind: 'equal-moments' | 'equally-near';
  readonly axes: readonly BodyAxis[];
  readonly text: string;
}

const PAIRS = [
  { i: 0, j: 1, order: [1, 0, 2], axes: ['x', 'y'] },
  { i: 1, j: 2, order: [0, 2, 1], axes: ['y', 'z'] },
  { i: 2, j: 0, order: [2, 1, 0], axes: ['x', 'z'] },
] as const;

const CYCLES = [
  [1, 2, 0],
  [2, 0, 1],
] as const;

/** Where the pairing of principal with body axes is a matter of choice: empty for nearly every aircraft. */
export function pairingTies({ moments, axes }: Principal): PairingTie[] {
  const scale = EQUAL_MOMENTS * Math.max(...moments.map(Math.abs));
  const here = nearnessOf(axes, [0, 1, 2]);
  const ties = PAIRS.flatMap(({ i, j, order, axes: names }): PairingTie[] => {
    const [one, other] = names;
    if (Math.abs(moments[i] - moments[j]) <= scale)
      return [
        {
          kind: 'equal-moments',
          axes: names,
          text: `The moments about ${one} and ${other} are equal, so every axis in their plane is principal; those nearest to the body axes are given.`,
        },
      ];
    if (nearnessOf(axes, order) < here - TIE) return [];
    return [
      {
        kind: 'equally-near',
        axes: names,
        text: `Two principal axes are as near to body ${one} as to body ${other}; the smaller moment stands with ${one}.`,
      },
    ];
  });
  if (ties.length > 0 || CYCLES.every((order) => nearnessOf(axes, order) < here - TIE)) return ties;
  return [
    {
      kind: 'equally-near',
      axes: ['x', 'y', 'z'],
      text: 'The principal axes fit the body axes as well in another order; the smaller moment stands with the earlier axis.',
    },
  ];
}
