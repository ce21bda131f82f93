import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { namedSide } from '@/lib/findings/named-side';
import { ASK_THE_TEXT, NAMES_LEFT, NAMES_NO_SIDE, sideInBytes } from '@/lib/findings/columns/side-in-bytes';
import { type Component } from '@/lib/mass/component';
import { SETTINGS, sigmas } from '@/tests/mass/uncertainty/support';
import { aComponent, declarations } from '@/tests/support/mass';
import { randomNumbers } from '@/tests/support/random';
import { aircraft, foundBothWays, ids } from './support';

const NAMES = [
  'Rib 4',
  'Rib 4 LH',
  'Rib 4 RH',
  'LH rib  4',
  'Left-hand rib 4',
  'Bolt, left-hand thread',
  'Right angle bracket',
  'Right angle bracket, LH',
  'Flügel links LH',
  'Flügel RH',
  'left/right strut',
  'Leftover ballast',
  'BLH 7',
  'rhLH',
];

/** Rows as careless as the rules fear: repeats, slips, twins, assemblies, in every frame. */
function carelessRows(count: number, seed: number): Component[] {
  const random = randomNumbers(seed);
  const one = <T>(values: readonly T[]): T => {
    const value = values[Math.floor(random() * values.length)];
    if (value === undefined) throw new Error('nothing to choose from');
    return value;
  };
  return Array.from({ length: count }, (_, i): Component => {
    const part = Math.floor(random() * 40);
    const mass = one([0, 1, 1, 1, 0.45359237, 1.001, 1.2, 1000, 500, 1e-5]) * (1 + part);
    const k = mass * one([0.01, 0.04, 1e-6, 4, 1e3]);
    const isPoint = mass === 0 || random() < 0.4;
    const product = one([0, 0, 0.3, -0.3, 2]) * k;
    return aComponent({
      item: one([`A-${i}`, `A-${i}`, `LH-${i}`]),
      partNumber: one([null, `PN-${part}`, `PN-${part}`]),
      partRevision: one([null, null, 'A']),
      description: one([null, ...NAMES]),
      group: one(['Wing/Ribs', 'Wing', 'Body', 'Body', 'Ungrouped']),
      parent: random() < 0.2 ? `A-${Math.floor(random() * count)}` : null,
      counting: random() < 0.1 ? 'memo' : 'counted',
      quantity: one([1, 1, 1, 3]),
      mass: random() < 0.05 ? -mass : mass,
      position: one([
        [3, one([0.5, -0.5, 0, 1e-4]), 1],
        [3 + 0.001 * part, 0.5, 1],
        [part, one([-4, 4]), random()],
        [0, 0, 0],
        [900 * random(), 25.4, 1],
      ] as const),
      moments: isPoint
        ? { ixx: 0, iyy: 0, izz: 0, ixy: 0, ixz: 0, iyz: 0 }
        : {
            ixx: k,
            iyy: one([1, 1.5, 3]) * k,
            izz: one([1, 2]) * k,
            ixy: product,
            ixz: one([0, product]),
            iyz: 0,
          },
      orientation: one([
        { yaw: 0, pitch: 0, roll: 0 },
        { yaw: 0, pitch: 0, roll: 0 },
        { yaw: 0.3, pitch: 0, roll: -1 },
      ]),
      pair: random() < 0.15,
      maturity: one(['E', 'C', 'A', null]),
      growth: one([null, null, 0, 0.1, -0.05]),
      sigma: random() < 0.2 ? sigmas({ mass: one([0.1, 5]), ixx: one([null, 10 * k]) }) : null,
      changeRef: one([null, 'CR-1']),
      status: one(['approved', 'approved', 'pending']),
    });
  });
}

describe('rows shown in blocks', () => {
  const contexts = [{}, { geometry: aircraft(), groups: { isUnknown: (group: string) => group === 'Body' } }];

  it.each([3, 159])(
    'give the findings of rows shown one by one, of every rule, in every frame (seed %i)',
    (seed) => {
      const seen = new Set<string>();
      for (const { list, frame } of SETTINGS)
        for (const context of contexts)
          for (const kind of ['components', 'adjustments'] as const)
            for (const count of [40, 600]) {
              const former = [
                {
                  group: 'Wing',
                  rows: count,
                  basic: {
                    mass: 10 * count,
                    first: [9, 1, 2] as const,
                    second: { xx: 1, yy: 1, zz: 1, xy: 0, xz: 0, yz: 0 },
                  },
                },
              ];
              const geometry =
                context.geometry === undefined
                  ? undefined
                  : { ...context.geometry, ...frame, span: 20, length: 16 };
              const said = { ...context, geometry, former };
              for (const id of ids(foundBothWays(carelessRows(count, seed + count), { ...list, kind }, said)))
                seen.add(id);
            }
      // Most rules on rows have something to say of such lists.
      expect(seen.size).toBeGreaterThan(31);
    },
  );

  it('give them for lists longer than what rules keep: 20,000 names, numbers, places and assemblies', () => {
    const random = randomNumbers(8);
    const rows = Array.from({ length: 30_000 }, (_, i) => {
      const again = i > 21_000 && random() < 0.3 ? Math.floor(random() * i) : i;
      const mass = 1 + (again % 977) / 100;
      return aComponent({
        item: `I${i}`,
        partNumber: `P${again}`,
        description: `Part ${again}${again % 5 === 0 ? (i === again ? ' LH' : ' RH') : ''}`,
        group: `G${again % 1200}`,
        parent: i % 7 === 0 ? `I${Math.floor(random() * 30_000)}` : null,
        maturity: 'C',
        mass: random() < 0.01 ? mass * 2.2 : mass,
        position: [again / 100, again % 5 === 0 && i !== again ? 1 : -1, 0],
      });
    });
    const found = foundBothWays(rows, declarations());
    expect(ids(found)).toEqual(
      expect.arrayContaining(['duplicate-row', 'same-part-differs', 'mass-unit-slip']),
    );
  }, 60_000);
});

describe('the side that a name tells, from its bytes', () => {
  it('is that of its text, or the text is asked', () => {
    const word = fc.constantFrom(
      'left',
      'LH',
      'Right',
      'rh',
      'rib',
      'hand',
      'thread',
      'angle',
      'over',
      'ä',
      'l',
      'r',
      '7',
    );
    const name = fc
      .array(fc.tuple(word, fc.constantFrom(' ', '-', '', '/', ', ')), { maxLength: 6 })
      .map((parts) => parts.flat().join(''));
    let asked = 0;
    fc.assert(
      fc.property(name, (text) => {
        const bytes = new TextEncoder().encode(text);
        const side = sideInBytes(bytes, 0, bytes.length);
        if (side === ASK_THE_TEXT) asked += 1;
        else {
          const wanted = side === NAMES_NO_SIDE ? null : side === NAMES_LEFT ? 'left' : 'right';
          expect([text, wanted]).toEqual([text, namedSide(text)]);
        }
      }),
      { seed: 5, numRuns: 20_000 },
    );
    expect(asked).toBeLessThan(10_000);
  });
});
