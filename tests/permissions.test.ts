import { describe, expect, it } from 'vitest';
import {
  type Action,
  may,
  MEMBER_ROLES,
  PROGRAM_ACTIONS,
  refusal,
  SITE_ACTIONS,
  type Standing,
} from '@/lib/permissions';

const STANDINGS = {
  outsider: { admin: false, role: null },
  admin: { admin: true, role: null },
  chief: { admin: false, role: 'chief' },
  weights: { admin: false, role: 'weights' },
  simulation: { admin: false, role: 'simulation' },
} as const satisfies Record<string, Standing>;

type Who = keyof typeof STANDINGS;

/** Who may do what, written down once more and by hand: the two must be changed together. */
const EXPECTED: Readonly<Record<Action, readonly Who[]>> = {
  'account.keep': ['outsider', 'admin', 'chief', 'weights', 'simulation'],
  'tokens.keep': ['outsider', 'admin', 'chief', 'weights', 'simulation'],
  'programs.list': ['outsider', 'admin', 'chief', 'weights', 'simulation'],
  'roll-up.stateless': ['outsider', 'admin', 'chief', 'weights', 'simulation'],
  'people.keep': ['admin'],
  'programs.create': ['admin'],
  'program.read': ['chief', 'weights', 'simulation'],
  'members.read': ['admin', 'chief', 'weights', 'simulation'],
  'members.keep': ['admin', 'chief'],
  'settings.read': ['chief', 'weights'],
  'frame.keep': ['chief'],
  'reference-points.keep': ['chief'],
  'builds.keep': ['chief'],
  'limits.keep': ['chief'],
  'allowances.keep': ['chief'],
  'groups.keep': ['chief', 'weights'],
  'lists.read': ['chief', 'weights'],
  'lists.keep': ['weights'],
  'rotors.read': ['chief', 'weights'],
  'rotors.keep': ['weights'],
  'configurations.read': ['chief', 'weights'],
  'configurations.keep': ['weights'],
  'baselines.read': ['chief', 'weights', 'simulation'],
  'submissions.read': ['chief', 'weights'],
  'baselines.submit': ['weights'],
  'baselines.decide': ['chief'],
  'baselines.withdraw': ['chief'],
  'trail.read': ['chief', 'weights'],
};

const names = Object.keys(STANDINGS) as Who[];

describe.each([...SITE_ACTIONS, ...PROGRAM_ACTIONS])('%s', (action) => {
  it.each(names)(`is decided for %s as the table says`, (who) => {
    expect(may(action, STANDINGS[who])).toBe(EXPECTED[action].includes(who));
  });
});

describe('a refusal', () => {
  it.each(PROGRAM_ACTIONS)('of %s tells those outside a program nothing of it', (action) => {
    expect(refusal(action, STANDINGS.outsider)).toBe('not-found');
  });

  it('tells an administrator who is no member as little', () => {
    expect(refusal('lists.read', STANDINGS.admin)).toBe('not-found');
  });

  it.each(MEMBER_ROLES)('of a %s is plain, for they know the program', (role) => {
    const refused = PROGRAM_ACTIONS.filter((action) => !may(action, { admin: false, role }));
    expect(refused.length).toBeGreaterThan(0);
    for (const action of refused) expect(refusal(action, { admin: false, role })).toBe('forbidden');
  });

  it('on the site is plain', () => {
    expect(refusal('people.keep', STANDINGS.weights)).toBe('forbidden');
    expect(refusal('people.keep', STANDINGS.admin)).toBeNull();
  });
});

it('gives an administrator who is also a member what the role has, and no more of the content', () => {
  const both: Standing = { admin: true, role: 'simulation' };
  expect(may('members.keep', both)).toBe(true);
  expect(may('lists.read', both)).toBe(false);
});
