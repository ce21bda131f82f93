import { beforeAll, describe, expect, it } from 'vitest';

import { makeDemo } from '@/fixtures/demo/demo';
import { type Finding } from '@/lib/findings/finding';
import { RowChecks, findingsOnRotors, findingsOnWhole } from '@/lib/findings/look';
import { type BookedRow } from '@/lib/findings/removals/removal';
import { findingsOnRemovals } from '@/lib/findings/removals/rules';
import { carrierTensor } from '@/lib/findings/rotors/carrier';
import { readRotors } from '@/lib/ingest/rotors';
import { Placement } from '@/lib/mass/place';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { radiansPerSecond } from '@/lib/units/convert';
import { type ReadRevision, bytesOf, pinnedBy, readAll, rollUps } from '@/tests/demo/support';

/*
 * False alarms on the demo, with all that rules can know: the airframe, the revision before, the rows that carry the rotors.
 */

const demo = makeDemo();
const { geometry } = demo.frameIssue;
let read: ReadRevision[] = [];
beforeAll(async () => {
  read = await readAll(demo);
});

function found({ list, number, components }: ReadRevision): Finding[] {
  const before = read.find((each) => each.list === list && each.number === number - 1);
  const book = new SubtotalBook(new Placement(list.declarations, geometry));
  for (const component of before?.components ?? []) book.add(component);
  const checks = new RowChecks(list.declarations, {
    geometry,
    former: before === undefined ? undefined : book.subtotals(),
  });
  const then = new Map(before?.components.map((row) => [row.item, row]));
  for (const component of components) checks.see(component);
  for (const now of components) {
    const row = then.get(now.item);
    if (row !== undefined) checks.seeChange({ item: now.item, now, before: row });
  }
  return checks.findings();
}

describe('the lists of the demo', () => {
  it('raise no blocker in any revision, and one warning: a heavy row without moments', () => {
    const alarms = read.flatMap((revision) =>
      found(revision)
        .filter(({ severity }) => severity !== 'note')
        .map(({ rule, severity }) => [revision.list.code, severity, rule].join(' ')),
    );
    // The count of false alarms: no blocker, and this warning once in each of the three revisions of its list.
    expect(alarms).toEqual(Array.from({ length: 3 }, () => 'systems-and-interior warning heavy-point'));
  });

  it('raise no more than five notes each', () => {
    for (const revision of read)
      expect(found(revision).filter(({ severity }) => severity === 'note').length).toBeLessThanOrEqual(5);
  });

  it('tell of a slip put into each of them', () => {
    for (const revision of read.filter(({ list }) => list.declarations.kind === 'components')) {
      const half = revision.components.filter(({ counting }) => counting === 'counted');
      const inch = half.map((row) => ({
        ...row,
        position: [25.4 * row.position[0], 25.4 * row.position[1], 25.4 * row.position[2]] as const,
      }));
      const rules = found({ ...revision, components: inch }).map(({ rule }) => rule);
      expect(rules, revision.list.code).toContain('far-outside-aircraft');
    }
  });
});

describe('the removals of the demo', () => {
  it('take away just what is there: nothing is said of them', () => {
    const rows = pinnedBy(demo, read, 'serial-1').flatMap(({ list, components }) => {
      const placement = new Placement(list.declarations, geometry);
      return components
        .filter(({ counting, status }) => counting === 'counted' && status === 'approved')
        .map((row) => ({ row, placement, list }));
    });
    const booked = ({ row, placement, list }: (typeof rows)[number]): BookedRow => ({
      name: `${list.code}/${row.item}`,
      growth: row.growth ?? 0,
      account: placement.account(row),
    });
    const removals = rows
      .filter(({ row, list }) => row.mass < 0 && list.declarations.kind === 'adjustments')
      .map((removal) => {
        const from = rows.find(
          ({ row, list }) =>
            list.declarations.kind === 'components' && row.partNumber === removal.row.partNumber,
        );
        return { removal: booked(removal), from: from === undefined ? null : booked(from) };
      });
    expect(removals.length).toBeGreaterThan(0);
    expect(findingsOnRemovals(removals)).toEqual([]);
  });
});

describe('the conditions and the rotors of the demo', () => {
  it('raise nothing', async () => {
    for (const { code } of demo.configurations)
      for (const [name, whole] of rollUps(demo, read, code))
        expect(findingsOnWhole(whole, geometry), `${code} ${name}`).toEqual([]);
    const { csv, inertiaUnit } = demo.rotatingParts;
    const { rotors } = await readRotors(bytesOf(csv), { inertiaUnit });
    const points = demo.rotatingParts.points.map(({ code, title, speeds }) => ({
      code,
      title,
      speeds: speeds.map(({ shaft, rpm }) => ({ shaft, speed: radiansPerSecond(rpm), sigma: null })),
    }));
    const carriers = new Map(
      pinnedBy(demo, read, 'flight-release').flatMap(({ list, components }) => {
        const placement = new Placement(list.declarations, geometry);
        return components.map((row) => [`${list.code}/${row.item}`, carrierTensor(row, placement)] as const);
      }),
    );
    expect(findingsOnRotors({ rotors, points, geometry, carriers })).toEqual([]);
  });
});
