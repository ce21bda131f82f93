import { describe, expect, it } from 'vitest';
import { MASS_LIST_LIMITS } from '@/lib/ingest/limits';
import { readMassList } from '@/lib/ingest/mass-list';
import { problemSentence } from '@/lib/ingest/problem-log';
import { declare, fixtureBytes, inPieces, readList, utf8 } from './support';

const HEAD = 'item,mass,x,y,z,ixx,iyy,izz,ixy,ixz,iyz,yaw,pitch,roll,growth_percent\n';

describe('a component', () => {
  it('is in SI, by the exact factors of NIST SP 811 (2008), appendix B.8', async () => {
    const declarations = declare({ mass_unit: 'lb', length_unit: 'in', inertia_unit: 'lb.in2' });
    const { components } = await readList(
      utf8(`${HEAD}A,2,10,-20,30,4,5,6,0,0,0,90,-45,180,12.5\n`),
      declarations,
    );
    // lb = 0.45359237 kg and in = 0.0254 m, both exact; lb.in2 is their product.
    const inertia = 0.45359237 * 0.0254 * 0.0254;
    expect(components).toHaveLength(1);
    const [a] = components;
    expect(a?.mass).toBe(0.90718474);
    expect(a?.position).toEqual([0.254, -0.508, 0.762]);
    expect(a?.moments.ixx).toBeCloseTo(4 * inertia, 18);
    expect(a?.moments.izz).toBeCloseTo(6 * inertia, 18);
    expect(a?.orientation).toEqual({ yaw: Math.PI / 2, pitch: -Math.PI / 4, roll: Math.PI });
    expect(a?.growth).toBe(0.125);
  });

  it('has products as positive integrals, whichever sign the list declares', async () => {
    const row = utf8(`${HEAD}A,2,0,0,0,4,5,6,0.5,-0.25,0,,,,\n`);
    const positive = await readList(row, declare({ products: 'positive' }));
    const negative = await readList(row, declare({ products: 'negative' }));
    expect(positive.components[0]?.moments).toEqual({ ixx: 4, iyy: 5, izz: 6, ixy: 0.5, ixz: -0.25, iyz: 0 });
    expect(negative.components[0]?.moments).toEqual({ ixx: 4, iyy: 5, izz: 6, ixy: -0.5, ixz: 0.25, iyz: 0 });
  });

  it.each([
    ['1sigma', 1],
    ['2sigma', 2],
    ['3sigma', 3],
    // JCGM 100:2008, 4.3.7: a uniform distribution of half-width a has the variance a2/3.
    ['half-width', Math.sqrt(3)],
  ])('has uncertainties of one standard deviation, stated as %s', async (uncertainty, coverage) => {
    const text = 'item,mass,x,y,z,mass_sigma,z_sigma,ixy_sigma\nA,2,0,0,0,0.6,0,0.03\n';
    const { components } = await readList(
      utf8(text),
      declare({ uncertainty, products: 'negative', mass_unit: 'g' }),
    );
    const sigma = components[0]?.sigma;
    expect(sigma?.mass).toBeCloseTo(0.0006 / coverage, 18);
    expect(sigma?.ixy).toBeCloseTo(0.03 / coverage, 15);
    expect(sigma).toMatchObject({ x: null, y: null, z: 0, ixx: null });
  });
});

describe('reading a mass list', () => {
  const rows = (count: number): string =>
    Array.from({ length: count }, (_, index) => `I${index},1,2,3,4\n`).join('');

  it('waits for the consumer of a row before it reads the next', async () => {
    const events: string[] = [];
    const { problems } = await readMassList(inPieces(utf8(`item,mass,x,y,z\n${rows(3)}`)), declare(), {
      async onComponent({ item }, line) {
        events.push(`${item} begins`);
        await new Promise((resolve) => setTimeout(resolve, 1));
        events.push(`${item} of line ${line} ends`);
      },
    });
    expect(problems).toEqual([]);
    expect(events).toEqual([
      'I0 begins',
      'I0 of line 2 ends',
      'I1 begins',
      'I1 of line 3 ends',
      'I2 begins',
      'I2 of line 4 ends',
    ]);
  });

  it('tells how far it is in rows and bytes', async () => {
    const file = utf8(`item,mass,x,y,z\n${rows(20_000)}`);
    const seen: { rows: number; bytes: number }[] = [];
    await readList(inPieces(file, 10_000), declare(), { onProgress: (progress) => seen.push(progress) });
    expect(seen.length).toBeGreaterThan(3);
    expect(seen.toSorted((a, b) => a.rows - b.rows || a.bytes - b.bytes)).toEqual(seen);
    expect(seen.at(-1)).toEqual({ rows: 20_000, bytes: file.length });
  });

  it('passes on errors of the source and of the consumer as they are', async () => {
    async function* failing(): AsyncGenerator<Uint8Array> {
      yield utf8('item,mass,x,y,z\nA,1,2,3,4\n');
      throw new Error('the store is gone');
    }
    await expect(readList(failing())).rejects.toThrow('the store is gone');
    const refusing = readMassList(inPieces(utf8('item,mass,x,y,z\nA,1,2,3,4\n')), declare(), {
      onComponent: () => Promise.reject(new Error('the table is full')),
    });
    await expect(refusing).rejects.toThrow('the table is full');
  });

  it('keeps the first 200 problems in the order of the file and counts all', async () => {
    const wrong = Array.from({ length: 300 }, (_, index) => `I${index},x,2,3,4\nJ${index},1,2,3,-\n`).join(
      '',
    );
    const {
      rows: count,
      problems,
      problemCounts,
      components,
    } = await readList(utf8(`item,mass,x,y,z\n${wrong}`));
    expect(count).toBe(600);
    expect(components).toEqual([]);
    expect(problems.map(({ line }) => line)).toEqual(Array.from({ length: 200 }, (_, index) => index + 2));
    expect(problemCounts).toEqual({ 'not-a-number': 600 });
  });

  it('names every problem of a row, and says it in a sentence', async () => {
    const { problems } = await readList(fixtureBytes('lists/invalid', 'thousands-separator'));
    expect(problems.map(problemSentence)).toContain(
      'Line 3, column x: `2,345` has a thousands separator. Write `2345`, or `2.345` if the comma is the decimal mark.',
    );
    const several = await readList(utf8('item,quantity,mass,x,y,z,maturity\n,0,a,,1,2,Q\n'));
    expect(several.problems.map(({ column }) => column)).toEqual([
      'item',
      'quantity',
      'mass',
      'x',
      'maturity',
    ]);
  });

  it('maps header names of the file to columns, as the list remembers them', async () => {
    const text = 'Pos.,Gewicht,X [m],y,z,zone\nA,1.5,2,3,4,12\n';
    const mapping = { 'Pos.': 'item', Gewicht: 'mass', 'X [m]': 'x' } as const;
    const read = await readList(utf8(text), declare(), { mapping });
    expect(read.problems).toEqual([]);
    expect(read.unknownColumns).toEqual(['zone']);
    expect(read.components[0]).toMatchObject({
      item: 'A',
      mass: 1.5,
      position: [2, 3, 4],
      extra: { zone: '12' },
    });
    const unmapped = await readList(utf8(text));
    expect(unmapped.problems.map(({ column }) => column)).toEqual(['mass', 'x', 'item']);
    expect(unmapped.unknownColumns).toEqual(['Pos.', 'Gewicht', 'X [m]', 'zone']);
  });

  it('keeps a column of any name without harm', async () => {
    const read = await readList(utf8('item,mass,x,y,z,__proto__,constructor\nA,1,2,3,4,p,c\n'));
    expect(Object.entries(read.components[0]?.extra ?? {})).toEqual([
      ['__proto__', 'p'],
      ['constructor', 'c'],
    ]);
  });

  it('stops at the limit of rows', async () => {
    const limits = { ...MASS_LIST_LIMITS, rows: 5 };
    const read = await readList(utf8(`item,mass,x,y,z\n${rows(7)}`), declare(), { limits });
    expect(read.problems).toMatchObject([{ kind: 'too-many-rows', line: 7 }]);
    expect(read.rows).toBe(5);
    expect((await readList(utf8(`item,mass,x,y,z\n${rows(5)}`), declare(), { limits })).problems).toEqual([]);
  });

  it('sees a duplicate of a row that is itself wrong', async () => {
    const { problemCounts } = await readList(utf8('item,mass,x,y,z\nA,?,2,3,4\nA,1,2,3,4\n'));
    expect(problemCounts).toEqual({ 'not-a-number': 1, 'duplicate-item': 1 });
  });

  it.each([
    ['a row that cannot be read', utf8('P,1\n'), 'too-few-fields'],
    ['text that cannot be read', new Uint8Array([0xe9, 0x0a]), 'not-utf8'],
  ])('does not miss a parent that may stand in %s', async (_what, bytes, kind) => {
    const file = new Uint8Array([...utf8('item,parent,mass,x,y,z\nA,P,1,2,3,4\n'), ...bytes]);
    expect((await readList(file)).problemCounts).toEqual({ [kind]: 1 });
  });
});
