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
  'reference-point.added': { code: 'MRC', frameIssue: 1 },
  'build.added': { code: 'design', kind: 'design' },
  'limit.set': { quantity: 'mass-maximum', value: 7450, before: 7400, source: 'type specification' },
  'limit.removed': { quantity: 'cg-aft-percent-mac', before: 34 },
  'allowance.set': { maturity: 'E', fraction: 0.06, before: null },
  'list.created': { code: 'wing', title: 'Wing' },
  'list.declared': { code: 'wing', before: { massUnit: 'kg' }, after: { massUnit: 'lb' } },
  'import.requested': { list: 'wing', file: 'wing.csv', sha256: 'ab'.repeat(32) },
  'import.failed': { list: 'wing', file: 'wing.csv', problems: 1 },
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
      'Set the maximum mass (kg) to 7450, before 7400. Source: type specification',
    );
  });

  it('of a kind that is not known tell the detail as it stands', () => {
    expect(kindName('later.kind')).toBe('later.kind');
    expect(eventWords('later.kind', { a: 1 })).toBe('{"a":1}');
  });
});
