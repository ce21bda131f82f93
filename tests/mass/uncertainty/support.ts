import { type Pose } from '@/lib/frames/pose';
import { momentsOf } from '@/lib/frames/products';
import { AccountSum } from '@/lib/mass/account';
import { type Component, type ComponentSigma } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { accountOfComponent } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { congruence, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { aComponent, declarations, geometry, properties } from '@/tests/support/mass';
import { randomNumbers } from '@/tests/support/random';

export const VALUES = ['mass', 'x', 'y', 'z', 'ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;
export type ValueName = (typeof VALUES)[number];

const NO_SIGMA: ComponentSigma = {
  mass: null,
  x: null,
  y: null,
  z: null,
  ixx: null,
  iyy: null,
  izz: null,
  ixy: null,
  ixz: null,
  iyz: null,
};

export const sigmas = (said: Partial<ComponentSigma>): ComponentSigma => ({ ...NO_SIGMA, ...said });

/** Lists in every frame that the engine knows, airframes of both hands, all with a body x turned from the reference line. */
export const SETTINGS: readonly {
  readonly name: string;
  readonly list: ListDeclarations;
  readonly frame: AirframeGeometry;
}[] = (() => {
  const turned: Pose = { origin: [3, -1, 0.5], yaw: 0.4, pitch: -0.3, roll: 1.1 };
  const usual = geometry({
    axes: ['aft', 'right', 'up'],
    incidence: 0.05,
    reference: [4, 0, 1],
    lateralPlane: 0.25,
    mac: 2,
  });
  const left = { ...usual, axes: ['aft', 'left', 'up'] } as const;
  return [
    { name: 'a plain list', list: declarations({ axes: usual.axes }), frame: usual },
    {
      name: 'a turned list',
      list: declarations({ axes: ['up', 'aft', 'left'], pose: turned }),
      frame: usual,
    },
    { name: 'a left-handed airframe', list: declarations({ axes: usual.axes, pose: turned }), frame: left },
    {
      name: 'a turned half list in a left-handed airframe',
      list: declarations({ axes: ['aft', 'left', 'down'], pose: turned, extent: 'left-half' }),
      frame: left,
    },
  ];
})();

/** Rows with full tensors, turned, some several, some pairs, some removals; own moments with and without a σ of their own. */
export function uncertainRows(count: number, seed: number, share = 1e-3): Component[] {
  const random = randomNumbers(seed);
  const between = (low: number, high: number): number => low + (high - low) * random();
  return Array.from({ length: count }, (_, i) => {
    const mass = between(5, 40) * (i % 7 === 6 ? -0.2 : 1);
    const edge = (): Vec3 => [between(-1, 1), between(-1, 1), between(-1, 1)];
    const second = congruence([edge(), edge(), edge()], {
      xx: mass,
      yy: mass,
      zz: mass,
      xy: 0,
      xz: 0,
      yz: 0,
    });
    const moments = momentsOf(traceMinus(second));
    const part = (value: number): number => between(0.3, 1) * share * Math.abs(value);
    const own = i % 3 === 0 ? {} : { ixx: part(moments.iyy), izz: part(moments.izz), ixy: part(moments.ixx) };
    const rest =
      i % 3 === 1 ? {} : { iyy: part(moments.iyy), ixz: part(moments.izz), iyz: part(moments.iyy) };
    return aComponent({
      item: `row ${i}`,
      group: i % 2 === 0 ? 'Wing' : 'Body',
      mass,
      moments,
      position: [between(-3, 9), between(-4, 4), between(-1, 3)],
      orientation: { yaw: between(-3, 3), pitch: between(-1, 1), roll: between(-3, 3) },
      quantity: 1 + (i % 3),
      pair: i % 4 === 1,
      growth: i % 5 === 0 ? 0.1 : null,
      maturity: i % 2 === 0 ? 'E' : 'C',
      // The last row states nothing, the one before it no mass.
      sigma:
        i === count - 1
          ? null
          : sigmas({
              ...own,
              ...rest,
              mass: i === count - 2 ? null : part(mass),
              x: part(5),
              y: part(4),
              z: part(1),
            }),
    });
  });
}

/** The row with one of its values moved; own moments without a σ go with the mass. */
export function moved(row: Component, value: ValueName, by: number): Component {
  const { mass, moments, position, sigma } = row;
  if (value === 'mass') {
    const scale = (mass + by) / mass;
    const element = (name: keyof typeof moments): number =>
      sigma !== null && sigma[name] !== null ? moments[name] : moments[name] * scale;
    return {
      ...row,
      mass: mass + by,
      moments: {
        ixx: element('ixx'),
        iyy: element('iyy'),
        izz: element('izz'),
        ixy: element('ixy'),
        ixz: element('ixz'),
        iyz: element('iyz'),
      },
    };
  }
  const at = ['x', 'y', 'z'].indexOf(value);
  if (at < 0)
    return { ...row, moments: { ...moments, [value]: moments[value as keyof typeof moments] + by } };
  const place = (k: 0 | 1 | 2): number => position[k] + (k === at ? by : 0);
  return { ...row, position: [place(0), place(1), place(2)] };
}

/** Mass, CG and the six moments of rows in the order of RESULTS, by the roll-up alone; `growth` as factors of the rows. */
export function resultsOf(
  rows: readonly Component[],
  list: ListDeclarations,
  frame: AirframeGeometry,
  growth: (row: Component) => number = () => 1,
): number[] {
  const sum = new AccountSum();
  for (const row of rows) sum.add(accountOfComponent(row, list, frame), growth(row));
  const result = resultOf(sum.account, frame);
  const { cg, inertia } = properties(result);
  const { ixx, iyy, izz, ixy, ixz, iyz } = inertia;
  return [result.mass, ...cg, ixx, iyy, izz, ixy, ixz, iyz];
}
