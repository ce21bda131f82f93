import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { rotorRevisionsOf } from '@/db/queries/configurations';
import { rotorFromTexts, type RotorTexts } from '@/lib/ingest/one-rotor';
import { type Rotor } from '@/lib/rotors/rotor';
import { editRotor } from '@/lib/server/rotors/edit-rotor';
import { type ProgramUnderTest, programUnderTest } from '@/tests/support/program';

/* Invented rotors. */
let test: ProgramUnderTest;
beforeAll(async () => {
  test = await programUnderTest();
});
afterAll(() => test.close());

const TEXTS = { rotor: 'Fan', polar_inertia: '2.5', axis_yaw: '0', axis_pitch: '0', sense: 'cw' };

function typed(texts: RotorTexts): { rotor: Rotor; inertiaUnit: 'kg.m2' } {
  const { rotor } = rotorFromTexts({ ...TEXTS, ...texts }, 'kg.m2');
  if (rotor === null) throw new Error('not a rotor');
  return { rotor, inertiaUnit: 'kg.m2' };
}

const edit = (
  base: number,
  was: string | null,
  now: ReturnType<typeof typed> | null,
  reason = 'for the test',
) =>
  editRotor(test.db, {
    person: test.crew.weights,
    programId: test.program.id,
    base,
    reason,
    was,
    now,
  });

const newest = async () => {
  const [revision] = await rotorRevisionsOf(test.db, test.program.id);
  return { number: revision?.number ?? 0, names: revision?.rotors.map(({ rotor }) => rotor), ...revision };
};

describe('a rotor that is edited', () => {
  it('is added, changed in its place and removed, each time in a revision with its reason', async () => {
    await edit(0, null, typed({}));
    await edit(1, null, typed({ rotor: 'Core', shaft: 'N2' }));
    expect((await newest()).names).toEqual(['Fan', 'Core']);
    await edit(2, 'Fan', typed({ rotor: 'Front fan', polar_inertia: '2.7' }), 'heavier blades');
    expect(await newest()).toMatchObject({
      number: 3,
      reason: 'heavier blades',
      author: 'weights',
      rotors: [
        { rotor: 'Front fan', polarInertia: 2.7, shaft: 'Front fan' },
        { rotor: 'Core', shaft: 'N2' },
      ],
    });
    await edit(3, 'Core', null);
    expect((await newest()).names).toEqual(['Front fan']);
    const revisions = await rotorRevisionsOf(test.db, test.program.id);
    expect(revisions.find(({ number }) => number === 3)?.rotors).toHaveLength(2);
  });

  it('is refused when someone else has made a revision meanwhile: nothing is overwritten', async () => {
    const { number } = await newest();
    const both = await Promise.allSettled([
      edit(number, 'Front fan', typed({ rotor: 'Front fan', polar_inertia: '3' })),
      edit(number, 'Front fan', typed({ rotor: 'Front fan', polar_inertia: '4' })),
    ]);
    const refused = both.flatMap((one) => (one.status === 'rejected' ? [one.reason as unknown] : []));
    expect(refused).toHaveLength(1);
    expect(refused[0]).toMatchObject({ code: 'conflict' });
    expect((await newest()).number).toBe(number + 1);
  });

  it('is refused when its name is taken, at the field, and when it is no longer there', async () => {
    const { number } = await newest();
    await expect(edit(number, null, typed({ rotor: 'Front fan' }))).rejects.toMatchObject({
      code: 'invalid-input',
      errors: [{ pointer: '/rotor' }],
    });
    await expect(edit(number, 'Core', null)).rejects.toMatchObject({ code: 'not-found' });
    expect((await newest()).number).toBe(number);
  });
});
