import { describe, expect, it } from 'vitest';
import { type AuditDetails, type AuditKind } from '@/lib/audit/events';
import { AUDIT_KINDS, eventWords, kindName } from '@/lib/audit/words';

/** One event of every kind; the compiler asks for a new kind here too. */
const EVENTS: { readonly [K in AuditKind]: AuditDetails[K] } = {
  'user.invited': { email: 'a@skerry.example' },
  'user.joined': { email: 'a@skerry.example' },
  'user.disabled': { email: 'a@skerry.example' },
  'user.enabled': { email: 'a@skerry.example' },
  'user.made-admin': { email: 'a@skerry.example' },
  'user.signed-in': { email: 'a@skerry.example' },
  'user.password-changed': { email: 'a@skerry.example' },
  'user.sessions-ended': { email: 'a@skerry.example' },
  'user.mail-wish-set': { from: 'all', to: 'none' },
  'token.made': { name: 'simulator', scopes: ['baselines:read'], expiresAt: '2027-01-01T00:00:00.000Z' },
  'token.revoked': { name: 'simulator' },
  'program.created': { code: 'dunlin-40', title: 'Dunlin 40' },
  'member.added': { email: 'a@skerry.example', role: 'chief' },
  'member.role-changed': { email: 'a@skerry.example', from: 'chief', to: 'weights' },
  'member.removed': { email: 'a@skerry.example', role: 'simulation' },
  'frame.issued': { number: 2, title: 'Datum moved', reason: 'longer nose' },
  'frame.related': { number: 2, former: 'its datum at 2.5, 0, 0 m' },
  'list.carried': { list: 'wing', from: 1, to: 2, revision: 4, reason: 'carried' },
  'reference-point.added': { code: 'MRC', frameIssue: 1 },
  'build.added': { code: 'design', kind: 'design' },
  'limit.set': {
    quantity: 'mass',
    sense: 'at-most',
    group: 'Wing',
    condition: 'empty',
    value: 525,
    before: 520,
    source: 'control plan',
  },
  'limit.removed': { quantity: 'percentMac', sense: 'at-least', group: '', condition: null, before: 14 },
  'allowance.set': { maturity: 'E', group: 'Wing', fraction: 0.06, before: null },
  'allowance.removed': { maturity: 'E', group: 'Wing', before: 0.06 },
  'groups.changed': { change: 'moved', path: 'Wing/Nose', to: 'Wing/Leading edge', code: null },
  'list.created': { code: 'wing', title: 'Wing' },
  'list.declared': { code: 'wing', before: { massUnit: 'kg' }, after: { massUnit: 'lb' } },
  'list.mapped': { list: 'wing', file: 'nacelle.csv', mapping: 'm1', headingsSha256: 'cd'.repeat(32) },
  'upload.kept': { list: 'wing', file: 'nacelle.csv', sha256: 'ab'.repeat(32) },
  'upload.dropped': { list: 'wing', file: 'nacelle.csv' },
  'import.requested': { list: 'wing', file: 'wing.csv', sha256: 'ab'.repeat(32) },
  'import.failed': { list: 'wing', file: 'wing.csv', problems: 1 },
  'import.cancelled': { list: 'wing', file: 'wing.csv' },
  'list.revised': {
    list: 'wing',
    number: 3,
    origin: 'file',
    reason: 'weighed',
    rows: 390,
    contentSha256: 'cd'.repeat(32),
  },
  'rotors.revised': { number: 1, reason: 'first issue' },
  'configuration.created': { code: 'release', title: 'Release', build: 'design' },
  'configuration.changed': { code: 'release', what: 'list revisions', version: 2 },
  'configuration.rolled-up': { code: 'release', version: 2, inputSha256: 'ef'.repeat(32) },
  'baseline.submitted': { submission: 'id', title: 'Release', configuration: 'release', version: 2 },
  'baseline.returned': { submission: 'id', title: 'Release', reason: 'weigh the tank bay' },
  'baseline.signed': { submission: 'id', title: 'Release', number: 3, digest: `sha256:${'12'.repeat(32)}` },
  'baseline.superseded': { number: 2, by: 3 },
  'baseline.withdrawn': { number: 2, reason: 'wrong tank bay' },
};

describe.each(AUDIT_KINDS)('an event of kind %s', (kind) => {
  it('has a name and a sentence that holds what its detail says', () => {
    const words = eventWords(kind, EVENTS[kind]);
    expect(kindName(kind)).not.toBe(kind);
    expect(words).not.toMatch(/undefined|null|NaN|\[object/);
    expect(words.length).toBeGreaterThan(8);
  });
});

describe('the words of an event', () => {
  it('tell what a declaration was and is', () => {
    expect(eventWords('list.declared', EVENTS['list.declared'])).toBe(
      'Changed what list wing declares: massUnit from "kg" to "lb"',
    );
  });

  it('tell a limit by its name and unit, with what it was', () => {
    expect(eventWords('limit.set', EVENTS['limit.set'])).toBe(
      'Set the most allowed mass (kg) of Wing in condition empty to 525, before 520. Source: control plan',
    );
    expect(eventWords('limit.removed', EVENTS['limit.removed'])).toBe(
      'Removed the least allowed CG (% MAC), which was 14',
    );
  });

  it('of before limits had groups and conditions are told as they were', () => {
    const former = { quantity: 'mass-maximum', value: 7450, before: 7400, source: 'type specification' };
    expect(eventWords('limit.set', former)).toBe(
      'Set the maximum mass (kg) to 7450, before 7400. Source: type specification',
    );
    expect(eventWords('limit.removed', { quantity: 'cg-aft-percent-mac', before: 34 })).toBe(
      'Removed the aft CG limit (% MAC), which was 34',
    );
    expect(eventWords('allowance.set', { maturity: 'E', fraction: 0.06, before: null })).toBe(
      'Set the growth allowance of maturity E to 6 %',
    );
  });

  it('tell what was done to the breakdown of groups', () => {
    const told = (change: string, path: string, to: string | null, code: string | null) =>
      eventWords('groups.changed', { change, path, to, code });
    expect(told('added', 'Wing', null, '10')).toBe('Added group Wing, code 10');
    expect(told('moved', 'Wing/Nose', 'Wing/Leading edge', null)).toBe(
      'Group Wing/Nose is Wing/Leading edge from now on',
    );
    expect(told('recoded', 'Wing', null, null)).toBe('Took the code of group Wing away');
    expect(told('removed', 'Wing', null, null)).toBe('Removed group Wing');
  });

  it('of a kind that is not known tell the detail as it stands', () => {
    expect(kindName('later.kind')).toBe('later.kind');
    expect(eventWords('later.kind', { a: 1 })).toBe('{"a":1}');
  });
});
