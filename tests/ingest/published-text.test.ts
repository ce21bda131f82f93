import { Readable } from 'node:stream';
import { describe, expect, it } from 'vitest';

import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { rollUpList } from '@/lib/ingest/roll-up-list';
import { fromSi } from '@/lib/units/convert';
import { JSBSIM_F16 } from '@/tests/references/aircraft';
import { properties } from '@/tests/support/mass';

const declared = (said: object) =>
  declarationsFromBody(
    listDeclarationsSchema.parse({ mass_unit: 'lb', length_unit: 'in', inertia_unit: 'slug.ft2', ...said }),
  );

const rolledUp = (csv: string, said: object = {}) =>
  rollUpList(Readable.from([Buffer.from(csv)]), declared(said));

describe('published models as lists', () => {
  it('the F-16 of JSBSim, negated products in structural axes, has +982 slug.ft2 in body axes', async () => {
    const { ixx, iyy, izz, ixz, bodyIxz } = JSBSIM_F16;
    const csv = `item,mass,x,y,z,ixx,iyy,izz,ixz\nF-16,17400,-193,0,-5.1,${[ixx, iyy, izz, ixz].join(',')}\n`;
    const axes = ['aft', 'right', 'up'];
    const shown = async (products: 'negative' | 'positive') => {
      const found = await rolledUp(csv, { axes, products });
      if (!('rollUp' in found)) throw new Error(found.problems.map(({ message }) => message).join(' '));
      return fromSi(properties(found.rollUp.basic).inertia.ixz, 'slug.ft2');
    };
    expect(await shown('negative')).toBeCloseTo(bodyIxz, 9);
    expect(await shown('positive')).toBeCloseTo(-bodyIxz, 9);
  });

  it('the NESC orbital sphere, whose file says "(2/5)pi" for its moments, is refused', async () => {
    // A9. orbital_sphere_inertia.dml (github.com/nasa/simupy-flight): not a number, and not 2/5 m r² of its 1/pi m across either.
    const found = await rolledUp('item,mass,x,y,z,ixx\nsphere,1,0,0,0,(2/5)pi\n');
    if ('rollUp' in found) throw new Error('The file was taken.');
    expect(found.problems).toMatchObject([
      { kind: 'not-a-number', line: 2, column: 'ixx', found: '(2/5)pi' },
    ]);
  });
});
