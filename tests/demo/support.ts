import { type DemoList, type DemoProgram, type DemoRevision } from '@/fixtures/demo/program';
import { type Finding } from '@/lib/findings/finding';
import { RowChecks } from '@/lib/findings/look';
import { type MassListReading, readMassList } from '@/lib/ingest/mass-list';
import { type Component } from '@/lib/mass/component';
import { Placement } from '@/lib/mass/place';
import { type RollUp, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';

export async function* bytesOf(text: string): AsyncGenerator<Uint8Array> {
  yield new TextEncoder().encode(text);
}

export interface ReadRevision {
  readonly list: DemoList;
  readonly number: number;
  readonly reading: MassListReading;
  readonly components: readonly Component[];
  readonly findings: readonly Finding[];
}

export async function readRevision(
  list: DemoList,
  revision: DemoRevision,
  number: number,
): Promise<ReadRevision> {
  const components: Component[] = [];
  const checks = new RowChecks(list.declarations);
  const reading = await readMassList(bytesOf(revision.csv), list.declarations, {
    onComponent: (component) => {
      components.push(component);
      checks.see(component);
    },
  });
  return { list, number, reading, components, findings: checks.findings() };
}

export async function readAll(demo: DemoProgram): Promise<ReadRevision[]> {
  const read: ReadRevision[] = [];
  for (const list of demo.lists)
    for (const [k, revision] of list.revisions.entries())
      read.push(await readRevision(list, revision, k + 1));
  return read;
}

export function codeOf(demo: DemoProgram, code: string): DemoProgram['configurations'][number] {
  const found = demo.configurations.find((configuration) => configuration.code === code);
  if (!found) throw new RangeError(`No configuration is called ${code}.`);
  return found;
}

/** The read revisions that a configuration pins. */
export function pinnedBy(demo: DemoProgram, read: readonly ReadRevision[], code: string): ReadRevision[] {
  return codeOf(demo, code).lists.map((pin) => {
    const found = read.find(({ list, number }) => list.code === pin.list && number === pin.revision);
    if (!found) throw new RangeError(`${pin.list} has no revision ${pin.revision}.`);
    return found;
  });
}

/** The configuration's conditions by code, rolled up by the engine. */
export function rollUps(demo: DemoProgram, read: readonly ReadRevision[], code: string): Map<string, RollUp> {
  const { geometry } = demo.frameIssue;
  const subtotals = pinnedBy(demo, read, code).flatMap(({ list, components }) => {
    const book = new SubtotalBook(new Placement(list.declarations, geometry));
    for (const component of components) book.add(component);
    return book.subtotals();
  });
  const own = demo.growthAllowances.filter(({ group }) => group === '');
  const allowance = (maturity: 'E' | 'C' | 'A'): number =>
    own.find((each) => each.maturity === maturity)?.fraction ?? NaN;
  const allowances = {
    E: allowance('E'),
    C: allowance('C'),
    A: allowance('A'),
    groups: demo.growthAllowances.filter(({ group }) => group !== ''),
  };
  return new Map(
    codeOf(demo, code).conditions.map((condition) => {
      const items = condition.items.map(({ name, mass, place }) => ({ name, mass, position: place }));
      return [condition.code, rollUp(subtotals, items, geometry, allowances)];
    }),
  );
}
