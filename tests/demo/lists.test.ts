import { createHash } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { makeDemo } from '@/fixtures/demo/demo';
import { type ReadRevision, pinnedBy, readAll, readRevision } from './support';

const demo = makeDemo();
let read: ReadRevision[] = [];
beforeAll(async () => {
  read = await readAll(demo);
});

describe('the generator', () => {
  it('gives the same bytes for the same seed, on every machine', () => {
    const digest = (text: string): string => createHash('sha256').update(text).digest('hex');
    expect(JSON.stringify(makeDemo())).toBe(JSON.stringify(demo));
    expect(digest(demo.lists.map(({ revisions }) => revisions.map(({ csv }) => csv).join('')).join(''))).toBe(
      '06b26bbb9a99cc61b420332efe4db368a60a26d534576cf392d3b377316bd993',
    );
  });

  it('gives other figures for another seed', () => {
    expect(makeDemo(7).lists[0]?.revisions[0]?.csv).not.toBe(demo.lists[0]?.revisions[0]?.csv);
  });
});

describe('the lists', () => {
  it('read without a problem, every revision of every list', () => {
    expect(read.flatMap(({ reading }) => reading.problems)).toEqual([]);
    expect(read.every(({ reading }) => reading.rows > 0)).toBe(true);
  });

  it('hold about 1,500 component lines in the five that make the aircraft', () => {
    const five = pinnedBy(demo, read, 'flight-release');
    expect(five).toHaveLength(5);
    const rows = five.reduce((sum, { reading }) => sum + reading.rows, 0);
    expect(rows).toBeGreaterThan(1400);
    expect(rows).toBeLessThan(1700);
  });

  it('come in different units, one in negative integrals, one as a half, one in a frame of its own, one marked', () => {
    const declared = pinnedBy(demo, read, 'flight-release').map(({ list }) => list.declarations);
    expect(
      new Set(
        declared.map(({ massUnit, lengthUnit, inertiaUnit }) => `${massUnit} ${lengthUnit} ${inertiaUnit}`),
      ).size,
    ).toBe(5);
    expect(declared.filter(({ products }) => products === 'negative')).toHaveLength(1);
    expect(declared.filter(({ extent }) => extent === 'left-half')).toHaveLength(1);
    expect(declared.filter(({ pose }) => pose.yaw !== 0 && pose.pitch !== 0)).toHaveLength(1);
    expect(declared.filter(({ marking }) => marking !== null)).toHaveLength(1);
  });

  it('use what a mass list can say: pairs, orientation, quantities, memo rows, growth, sigmas, columns of their own', () => {
    const rows = pinnedBy(demo, read, 'flight-release').flatMap(({ components }) => components);
    const share = (test: (row: (typeof rows)[number]) => boolean): number =>
      rows.filter(test).length / rows.length;
    expect(share(({ pair }) => pair)).toBeGreaterThan(0.2);
    expect(share(({ orientation }) => orientation.yaw !== 0 || orientation.pitch !== 0)).toBeGreaterThan(
      0.015,
    );
    expect(share(({ quantity }) => quantity > 1)).toBeGreaterThan(0.005);
    expect(share(({ growth }) => growth !== null)).toBeGreaterThan(0.05);
    expect(share(({ sigma }) => sigma?.mass != null)).toBeGreaterThan(0.6);
    expect(
      share(({ moments }) => moments.ixy !== 0 || moments.ixz !== 0 || moments.iyz !== 0),
    ).toBeGreaterThan(0.05);
    for (const maturity of ['E', 'C', 'A'])
      expect(share((row) => row.maturity === maturity)).toBeGreaterThan(0.1);
    expect(rows.filter(({ counting }) => counting === 'memo').length).toBeGreaterThan(8);
    expect(rows.some(({ extra }) => extra.zone !== undefined && extra.supplier !== undefined)).toBe(true);
  });

  it('give the children of each assembly a memo row whose mass is theirs', () => {
    for (const { components } of read) {
      for (const memo of components.filter(({ counting }) => counting === 'memo')) {
        const children = components.filter(({ parent }) => parent === memo.item);
        const mass = children.reduce((sum, child) => sum + child.quantity * child.mass, 0);
        expect(children.length).toBeGreaterThan(2);
        // Both were rounded to print.
        expect(Math.abs(memo.mass - mass)).toBeLessThan(2e-4 * (children.length + 1));
      }
    }
  });

  it('raise no blocker, and on the aircraft one warning, which a submission has to answer', () => {
    expect(read.flatMap(({ findings }) => findings.filter(({ severity }) => severity === 'blocker'))).toEqual(
      [],
    );
    const warnings = pinnedBy(demo, read, 'flight-release').flatMap(({ findings, components }) =>
      findings
        .filter(({ severity }) => severity === 'warning')
        .map(({ rule, rows }) => [
          rule,
          rows.map((item) => components.find((row) => row.item === item)?.description),
        ]),
    );
    expect(warnings).toEqual([['heavy-point', ['Air cycle unit']]]);
  });

  it('have a removal among the changes of serial 1, and changes not approved yet', () => {
    const changes = read.find(({ list }) => list.declarations.kind === 'adjustments')?.components ?? [];
    expect(changes.filter(({ mass }) => mass < 0)).toHaveLength(1);
    expect(new Set(changes.map(({ status }) => status))).toEqual(
      new Set(['approved', 'pending', 'potential']),
    );
    expect(changes.every(({ changeRef }) => changeRef !== null)).toBe(true);
  });
});

describe('the revisions', () => {
  it('keep the keys of rows, so that what changed can be told', () => {
    for (const list of demo.lists) {
      const [first, ...later] = read.filter((each) => each.list.code === list.code);
      const items = new Set(first?.components.map(({ item }) => item));
      for (const revision of later) {
        const kept = revision.components.filter(({ item }) => items.has(item)).length;
        expect(kept / revision.components.length).toBeGreaterThan(0.97);
        expect(revision.components).not.toEqual(first?.components);
      }
    }
  });
});

describe('the refused upload', () => {
  it('has exactly the mistakes put in, each at its line and column', async () => {
    const list = demo.lists.find(({ code }) => code === demo.refusedUpload.list);
    if (!list) throw new RangeError('The refused upload names no list.');
    const { reading } = await readRevision(list, demo.refusedUpload, 2);
    expect(reading.problems.map(({ line, column, kind }) => [line, column, kind])).toEqual([
      [3, 'mass', 'decimal-comma'],
      [4, 'mass', 'not-a-number'],
      [5, 'item', 'duplicate-item'],
      [6, 'quantity', 'not-a-count'],
      [7, 'symmetry', 'unknown-value'],
      [9, 'x', 'blank'],
      [10, 'maturity', 'unknown-value'],
      [11, 'mass_sigma', 'negative-sigma'],
    ]);
  });
});

describe('the people', () => {
  it('let somebody else sign: two weights engineers, two chiefs, one invented domain', () => {
    const of = (role: string): number => demo.people.filter((person) => person.role === role).length;
    expect([of('weights'), of('chief'), of('simulation'), of('admin')]).toEqual([2, 2, 1, 1]);
    expect(demo.people.every(({ email }) => email.endsWith('@skerry.example'))).toBe(true);
    const engineers = new Set(demo.people.filter(({ role }) => role === 'weights').map(({ code }) => code));
    const authors = demo.lists.flatMap(({ revisions }) => revisions.map(({ by }) => by));
    expect(authors.every((author) => engineers.has(author))).toBe(true);
  });
});
