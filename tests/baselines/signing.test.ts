import { describe, expect, it } from 'vitest';
import { largestInertiaChange } from '@/lib/baselines/largest-change';
import { signingObstacles } from '@/lib/baselines/signing';

const CASE = {
  userId: 'chief',
  role: 'chief',
  state: 'submitted',
  submittedBy: 'weights',
  revisions: [{ list_code: 'wing', number: 3, created_by: 'weights' }],
  rotors: { number: 2, created_by: 'weights' },
} as const;

describe('a submission', () => {
  it('is signed by a chief engineer who neither submitted it nor made anything in it', () => {
    expect(signingObstacles(CASE)).toEqual([]);
  });

  it('is not signed by who submitted it or made revisions in it, and every ground is told', () => {
    const { revisions, rotors } = CASE;
    const own = {
      ...CASE,
      submittedBy: 'chief',
      revisions: [...revisions, { list_code: 'tail', number: 1, created_by: 'chief' }],
      rotors: { ...rotors, created_by: 'chief' },
    };
    expect(signingObstacles(own)).toEqual([
      expect.stringContaining('You submitted it'),
      expect.stringContaining('revision 1 of list tail'),
      expect.stringContaining('revision 2 of the rotating parts'),
    ]);
  });

  it.each(['weights', 'simulation', null] as const)('is not signed by role %s', (role) => {
    expect(signingObstacles({ ...CASE, role })).toHaveLength(1);
  });

  it('is not signed twice', () => {
    expect(signingObstacles({ ...CASE, state: 'returned' })).toEqual(['It is decided already.']);
  });
});

describe('the largest change of a tensor', () => {
  const none = { before: 1, after: 1, delta: 0 };
  const inertia = { ixx: none, iyy: none, izz: none, ixy: none, ixz: none, iyz: none };

  it('is the moment or product that changed most, whatever its sign', () => {
    const change = {
      ...inertia,
      ixx: { before: 10, after: 14, delta: 4 },
      ixz: { before: 3, after: -2, delta: -5 },
    };
    expect(largestInertiaChange({ inertia: change })).toEqual({ element: 'ixz', delta: -5 });
  });

  it('is none where nothing changed or one side has no tensor', () => {
    expect(largestInertiaChange({ inertia })).toBeNull();
    const gone = { before: 10, after: null, delta: null };
    expect(largestInertiaChange({ inertia: { ...inertia, ixx: gone } })).toBeNull();
  });
});
