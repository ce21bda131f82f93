import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  ACCOUNT_QUANTITIES,
  accountRefusal,
  type AccountSide,
  massAccount,
  ON_BOARD,
} from '@/lib/baselines/mass-account';
import { type Account, accountOfBody, NOTHING } from '@/lib/mass/account';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { NO_GROWTH, type OnBoardItem, rollUp } from '@/lib/mass/roll-up';
import { type Sym3, ZERO_SYM } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { anySecondMoment } from '@/tests/support/arbitrary';
import { geometry } from '@/tests/support/mass';

interface Body {
  readonly group: string;
  readonly mass: number;
  readonly place: Vec3;
  readonly own?: Sym3;
}

const accountOf = ({ mass, place, own = ZERO_SYM }: Body): Account => accountOfBody(mass, place, own);

function side(
  bodies: readonly Body[],
  items: readonly OnBoardItem[] = [],
  frame: AirframeGeometry = geometry(),
): AccountSide {
  const subtotals = bodies.map((body) => ({
    group: body.group,
    category: 'empty' as const,
    maturity: null,
    status: 'approved' as const,
    rows: 1,
    pieces: 1,
    memoRows: 0,
    basic: accountOf(body),
    statedPredicted: NOTHING,
    unstatedBasic: accountOf(body),
  }));
  const rolled = rollUp(subtotals, items, frame, NO_GROWTH);
  return {
    geometry: frame,
    condition: { items, rollUp: rolled },
  };
}

const BODY: Body = { group: 'Body', mass: 900, place: [0, 0, 0] };

describe('the account of a change', () => {
  it('gives each group the difference of its masses, in the order of the paths, items on board last', () => {
    const seat: OnBoardItem = { name: 'crew', mass: 80, position: [2, 0, 0] };
    const { before, after, steps, unchanged } = massAccount(
      side([
        BODY,
        { group: 'Wing/Skin', mass: 50, place: [1, 0, 0] },
        { group: 'Tail', mass: 40, place: [-6, 0, 0] },
      ]),
      side(
        [
          BODY,
          { group: 'Wing/Skin', mass: 53, place: [1, 0, 0] },
          { group: 'Avionics', mass: 12, place: [4, 0, 0] },
        ],
        [seat],
      ),
      'mass',
    );
    expect([before, after]).toEqual([990, 1045]);
    expect(steps).toEqual([
      { group: 'Avionics', deeper: false, from: 990, to: 1002 },
      { group: 'Tail', deeper: false, from: 1002, to: 962 },
      { group: 'Wing', deeper: true, from: 962, to: 965 },
      { group: ON_BOARD, deeper: false, from: 965, to: 1045 },
    ]);
    expect(unchanged).toBe(1);
  });

  it('gives an added point mass its step of CG and inertia by the reduced mass of the two', () => {
    // Two points m1, m2 a distance d apart: CG moves m2 d / (m1 + m2), inertia about it is m1 m2 / (m1 + m2) d² across the line.
    // Common practice, no source.
    const [m1, m2, d] = [900, 100, 4];
    const added: Body = { group: 'Avionics', mass: m2, place: [d, 0, 0] };
    const pair = [side([BODY]), side([BODY, added])] as const;
    const [cg] = massAccount(...pair, 'cgx').steps;
    expect(cg?.to).toBeCloseTo((m2 * d) / (m1 + m2), 12);
    for (const quantity of ['iyy', 'izz'] as const) {
      const [step] = massAccount(...pair, quantity).steps;
      expect(step).toMatchObject({ group: 'Avionics', from: 0 });
      expect(step?.to).toBeCloseTo(((m1 * m2) / (m1 + m2)) * d * d, 9);
    }
    expect(massAccount(...pair, 'ixx').steps).toEqual([]);
  });

  it('replaces the groups one after another: a step of CG depends on what was replaced before it', () => {
    const now = [
      { group: 'A', mass: 100, place: [4, 0, 0] as const },
      { group: 'B', mass: 100, place: [-4, 0, 0] as const },
    ];
    const { steps } = massAccount(side([BODY]), side([BODY, ...now]), 'cgx');
    expect(steps.map(({ group, to }) => [group, to])).toEqual([
      ['A', 400 / 1000],
      ['B', 0],
    ]);
  });

  it('draws up no CG or tensor across frame issues, and still the mass', () => {
    const moved = geometry({ reference: [1, 0, 0] });
    const pair = [side([BODY]), side([BODY, { group: 'A', mass: 1, place: [0, 0, 0] }], [], moved)] as const;
    expect(accountRefusal(...pair, 'ixz')).toContain('different frame issues');
    expect(() => massAccount(...pair, 'ixz')).toThrow(RangeError);
    expect(accountRefusal(...pair, 'mass')).toBeNull();
    expect(massAccount(...pair, 'mass').steps).toHaveLength(1);
  });

  it('draws up no CG where the mass between the two is not above zero', () => {
    const pair = [
      side([{ group: 'A', mass: 5, place: [0, 0, 0] }]),
      side([{ group: 'B', mass: 5, place: [1, 0, 0] }]),
    ] as const;
    expect(accountRefusal(...pair, 'cgx')).toContain('not above zero');
  });
});

const PATHS = [
  'Body/Skin',
  'Body/Frames',
  'Wing/Spars/Left',
  'Wing/Spars/Right',
  'Wing',
  'Tail',
  'Wing tips',
];

const anyBody = fc.record({
  group: fc.constantFrom(...PATHS),
  mass: fc.double({ min: 0.1, max: 500, noNaN: true }),
  place: fc.tuple(
    fc.double({ min: -9, max: 9, noNaN: true }),
    fc.double({ min: -9, max: 9, noNaN: true }),
    fc.double({ min: -3, max: 3, noNaN: true }),
  ),
  own: anySecondMoment,
});
const anyBodies = fc.array(anyBody, { minLength: 1, maxLength: 12 }).map((bodies) => [BODY, ...bodies]);

describe('whatever changed', () => {
  it('the steps join up from the stored value before to the stored value after, for every quantity', () => {
    fc.assert(
      fc.property(anyBodies, anyBodies, fc.constantFrom(...ACCOUNT_QUANTITIES), (old, now, quantity) => {
        const pair = [side(old), side(now)] as const;
        const { before, after, steps } = massAccount(...pair, quantity);
        const value = ({ condition }: AccountSide): number => {
          const { mass, properties } = condition.rollUp.basic;
          if (quantity === 'mass') return mass;
          const [x, y, z] = properties?.cg ?? [NaN, NaN, NaN];
          if (properties === null) return NaN;
          return { cgx: x, cgy: y, cgz: z, ...properties.inertia }[quantity];
        };
        expect([before, after]).toEqual(pair.map(value));
        expect(steps.at(0)?.from ?? before).toBe(before);
        expect(steps.at(-1)?.to ?? after).toBe(after);
        steps.slice(1).forEach((step, index) => expect(step.from).toBe(steps[index]?.to));
      }),
      { numRuns: 200 },
    );
  });

  it('the steps within a group make that group’s own step', () => {
    fc.assert(
      fc.property(anyBodies, anyBodies, fc.constantFrom(...ACCOUNT_QUANTITIES), (old, now, quantity) => {
        const pair = [side(old), side(now)] as const;
        const whole = massAccount(...pair, quantity);
        for (const step of whole.steps.filter(({ deeper }) => deeper)) {
          const inner = massAccount(...pair, quantity, step.group);
          const size = Math.max(Math.abs(step.from), Math.abs(step.to), 1);
          expect(Math.abs(inner.before - step.from) / size).toBeLessThan(1e-11);
          expect(Math.abs(inner.after - step.to) / size).toBeLessThan(1e-11);
          expect(
            inner.steps.every(({ group }) => group === step.group || group.startsWith(`${step.group}/`)),
          ).toBe(true);
        }
      }),
      { numRuns: 100 },
    );
  });

  it('each level is what a roll-up of the groups replaced so far says', () => {
    fc.assert(
      fc.property(anyBodies, anyBodies, (old, now) => {
        const pair = [side(old), side(now)] as const;
        const { steps } = massAccount(...pair, 'ixz');
        for (const step of steps) {
          const top = (path: string): string => path.split('/')[0] ?? '';
          const done = (path: string): boolean => top(path) <= step.group;
          const mixed = side([...now.filter((b) => done(b.group)), ...old.filter((b) => !done(b.group))]);
          const expected = mixed.condition.rollUp.basic.properties?.inertia.ixz ?? NaN;
          const size = 1 + (mixed.condition.rollUp.basic.properties?.inertia.izz ?? NaN);
          expect(Math.abs(step.to - expected) / size).toBeLessThan(1e-11);
        }
      }),
      { numRuns: 100 },
    );
  });
});
