import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { pinnedRevisions } from '@/db/queries/configurations';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

let test: ProgramUnderTest;

beforeAll(async () => {
  test = await programUnderTest();
  const { weights } = test.crew;
  await reviseList(test, weights, 'wing', 'item,mass,x,y,z\nspar,120,6.4,0,1\n');
  await reviseList(test, weights, 'wing', 'item,mass,x,y,z\nspar,121,6.4,0,1\n');
  await reviseList(test, weights, 'changes', 'item,mass,x,y,z,change_ref\nless spar,-3,6.4,0,1,C-1\n', {
    kind: 'adjustments',
  });
});
afterAll(() => test.close());

describe('a new configuration', () => {
  it('takes the newest revision of every list of components, and no adjustments unasked', async () => {
    const id = await createConfiguration(test.db, {
      person: test.crew.weights,
      programId: test.program.id,
      buildCode: 'design',
      code: 'new',
      title: 'New',
    });
    const pins = await pinnedRevisions(test.db, id);
    expect(pins.map(({ list_code, number }) => [list_code, number])).toEqual([['wing', 2]]);
  });
});
