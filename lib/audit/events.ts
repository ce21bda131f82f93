/**
 * Every kind of event that the trail records, with the detail it carries. A new step of the product adds its kind here; the
 * trail page and the verify command read from the same table.
 */
export interface AuditDetails {
  'user.invited': { email: string };
  'user.joined': { email: string };
  'user.disabled': { email: string };
  'user.enabled': { email: string };
  'user.made-admin': { email: string };
  'user.signed-in': { email: string };
  'user.password-changed': { email: string };
  'user.sessions-ended': { email: string };
  'user.mail-wish-set': { from: string; to: string };
  'token.made': { name: string; scopes: readonly string[]; expiresAt: string };
  'token.revoked': { name: string };
  'program.created': { code: string; title: string };
  'member.added': { email: string; role: string };
  'member.role-changed': { email: string; from: string; to: string };
  'member.removed': { email: string; role: string };
  /** `former`: how the issue before lies in this one, in words; absent for the first and in events of old. */
  'frame.issued': { number: number; title: string; reason: string; former?: string };
  'frame.related': { number: number; former: string };
  'reference-point.added': { code: string; frameIssue: number };
  'build.added': { code: string; kind: string };
  'limit.set': LimitWords & {
    value: number;
    before: number | null;
    source: string;
    kind?: string;
    from?: string;
    until?: string | null;
  };
  'limit.removed': LimitWords & { before: number };
  'allowance.set': { maturity: string; group?: string; fraction: number; before: number | null };
  'allowance.removed': { maturity: string; group: string; before: number };
  'groups.changed': { change: string; path: string; to: string | null; code: string | null };
  'list.created': { code: string; title: string };
  'list.declared': { code: string; before: unknown; after: unknown };
  'list.mapped': { list: string; file: string; mapping: string; headingsSha256: string };
  'upload.kept': { list: string; file: string; sha256: string };
  'upload.dropped': { list: string; file: string };
  'list.carried': { list: string; from: number; to: number; revision: number | null; reason: string };
  'import.requested': { list: string; file: string; sha256: string };
  'import.failed': { list: string; file: string; problems: number };
  'import.cancelled': { list: string; file: string };
  'list.revised': {
    list: string;
    number: number;
    origin: string;
    reason: string;
    rows: number;
    contentSha256: string;
  };
  'rotors.revised': { number: number; reason: string };
  'configuration.created': { code: string; title: string; build: string };
  'configuration.changed': { code: string; what: string; version: number };
  'baseline.submitted': { submission: string; title: string; configuration: string; version: number };
  'baseline.returned': { submission: string; title: string; reason: string };
  'baseline.signed': { submission: string; title: string; number: number; digest: string };
  'baseline.superseded': { number: number; by: number };
  'baseline.withdrawn': { number: number; reason: string };
  'configuration.rolled-up': { code: string; version: number; inputSha256: string };
}

/** Which limit; only `quantity` in events of before limits had groups and conditions. */
interface LimitWords {
  quantity: string;
  sense?: string;
  group?: string;
  condition?: string | null;
}

export type AuditKind = keyof AuditDetails;
