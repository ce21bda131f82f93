import { describe, expect, it } from 'vitest';
import { declare, fixtureBytes, fixtureExpectation, readList } from './support';

/*
 * NESC atmospheric check-cases, two-stage rocket; the sources, and how the components are to be read, stand beside the lists.
 * Here the rows are summed by hand, so that the fixtures are right whatever the engine does with them.
 */
interface Rocket {
  readonly source: string;
  readonly published: {
    readonly mass: number;
    readonly x: number;
    readonly ixx: number;
    readonly iyy: number;
    readonly izz: number;
    readonly iyyWithoutSlip?: number;
  };
  readonly declarations: unknown;
}

describe('the published two-stage rocket', () => {
  it.each(['liftoff', 'stage-1-burnout', 'stage-2-ignition', 'stage-2-burnout'])(
    'at %s has rows that sum to the published mass, CG and moments',
    async (moment) => {
      const name = `two-stage-rocket-${moment}`;
      const { published, declarations } = fixtureExpectation<Rocket>('lists/valid', name);
      const { components, problems } = await readList(
        fixtureBytes('lists/valid', name),
        declare(declarations),
      );
      expect(problems).toEqual([]);
      const mass = components.reduce((sum, row) => sum + row.mass, 0);
      const cg = components.reduce((sum, row) => sum + row.mass * row.position[0], 0) / mass;
      const about = (own: 'iyy' | 'izz'): number =>
        components.reduce((sum, row) => sum + row.moments[own] + row.mass * (row.position[0] - cg) ** 2, 0);
      expect(mass).toBe(published.mass);
      expect(Math.abs(cg - published.x)).toBeLessThan(6e-6);
      expect(components.reduce((sum, row) => sum + row.moments.ixx, 0)).toBe(published.ixx);
      const iyy = published.iyyWithoutSlip ?? published.iyy;
      expect(about('iyy')).toBeCloseTo(iyy, 5);
      expect(about('izz')).toBeCloseTo(iyy, 5);
    },
  );
});
