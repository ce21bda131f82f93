import { ROLE_NAMES } from '@/lib/permissions';
import { type AuditDetails, type AuditKind } from './events';

interface KindWords<K extends AuditKind> {
  /** What happened, as a choice of the trail's filter. */
  readonly name: string;
  readonly say: (detail: AuditDetails[K]) => string;
}

const role = (code: string): string =>
  (code in ROLE_NAMES ? ROLE_NAMES[code as keyof typeof ROLE_NAMES] : code).toLowerCase();
/** What each origin of a revision is made by. */
const MADE_BY: Readonly<Record<string, string>> = {
  file: 'a file',
  edit: 'edits',
  restored: 'bringing an old one back',
};

const short = (hash: string): string => hash.replace('sha256:', '').slice(0, 12);
const rows = (count: number): string => (count === 1 ? '1 row' : `${count} rows`);
const LIMITS: Readonly<Record<string, string>> = {
  'cg-forward-percent-mac': 'the forward CG limit (% MAC)',
  'cg-aft-percent-mac': 'the aft CG limit (% MAC)',
  'mass-maximum': 'the maximum mass (kg)',
};
const QUANTITIES: Readonly<Record<string, string>> = {
  mass: 'mass (kg)',
  percentMac: 'CG (% MAC)',
  cgx: 'CG x (m)',
  cgy: 'CG y (m)',
  cgz: 'CG z (m)',
};
const limit = ({ quantity, sense, group, condition }: AuditDetails['limit.removed']): string => {
  if (sense === undefined) return LIMITS[quantity] ?? quantity;
  const of = group ? ` of ${group}` : '';
  const where = condition ? ` in condition ${condition}` : '';
  const what = QUANTITIES[quantity] ?? `${quantity} (kg.m2)`;
  return `the ${sense === 'at-most' ? 'most' : 'least'} allowed ${what}${of}${where}`;
};
const ofGroup = (group: string | undefined): string => (group ? `, group ${group},` : '');
const GROUP_CHANGES: Readonly<Record<string, (detail: AuditDetails['groups.changed']) => string>> = {
  added: ({ path, code }) => `Added group ${path}${code === null ? '' : `, code ${code}`}`,
  moved: ({ path, to }) => `Group ${path} is ${to ?? ''} from now on`,
  recoded: ({ path, code }) =>
    code === null ? `Took the code of group ${path} away` : `Gave group ${path} the code ${code}`,
  removed: ({ path }) => `Removed group ${path}`,
};
const wasBefore = (before: number | null): string => (before === null ? '' : `, before ${before}`);

/** Every kind of event in words. A new kind says here what its reader will see. */
const WORDS: { readonly [K in AuditKind]: KindWords<K> } = {
  'user.invited': { name: 'Person invited', say: ({ email }) => `Invited ${email}` },
  'user.joined': { name: 'Person joined', say: ({ email }) => `${email} took the invitation` },
  'user.disabled': { name: 'Person disabled', say: ({ email }) => `Disabled ${email}` },
  'user.enabled': { name: 'Person enabled', say: ({ email }) => `Enabled ${email}` },
  'user.made-admin': {
    name: 'Administrator made',
    say: ({ email }) => `Made ${email} an administrator`,
  },
  'user.signed-in': { name: 'Signed in', say: ({ email }) => `${email} signed in` },
  'user.password-changed': {
    name: 'Password changed',
    say: ({ email }) => `Changed the password of ${email}`,
  },
  'user.sessions-ended': { name: 'Sessions ended', say: ({ email }) => `Ended every session of ${email}` },
  'user.mail-wish-set': {
    name: 'Mail wish set',
    say: ({ from, to }) => `Mails wanted: ${to}, before ${from}`,
  },
  'token.made': {
    name: 'Token made',
    say: ({ name, scopes, expiresAt }) =>
      `Made the token ${name} for ${scopes.join(', ')}, until ${expiresAt.slice(0, 10)}`,
  },
  'token.revoked': { name: 'Token revoked', say: ({ name }) => `Revoked the token ${name}` },
  'program.created': { name: 'Program created', say: ({ title }) => `Created the program ${title}` },
  'member.added': {
    name: 'Member added',
    say: (detail) => `Added ${detail.email} as ${role(detail.role)}`,
  },
  'member.role-changed': {
    name: 'Role changed',
    say: ({ email, from, to }) => `Changed the role of ${email} from ${role(from)} to ${role(to)}`,
  },
  'member.removed': {
    name: 'Member removed',
    say: (detail) => `Removed ${detail.email}, ${role(detail.role)}`,
  },
  'frame.issued': {
    name: 'Frame issued',
    say: ({ number, title, reason, former }) =>
      `Issued frame ${number}, ${title}: ${reason}${former === undefined ? '' : ` Frame ${number - 1} lies in it with ${former}`}`,
  },
  'frame.related': {
    name: 'Frame related',
    say: ({ number, former }) => `Said how frame ${number - 1} lies in frame ${number}: ${former}`,
  },
  'reference-point.added': {
    name: 'Reference point added',
    say: ({ code, frameIssue }) => `Added reference point ${code} to frame issue ${frameIssue}`,
  },
  'build.added': { name: 'Build added', say: ({ code, kind }) => `Added build ${code}, ${kind}` },
  'limit.set': {
    name: 'Limit set',
    say: (detail) =>
      `Set ${limit({ ...detail, before: 0 })} to ${detail.value}${wasBefore(detail.before)}. Source: ${detail.source}`,
  },
  'limit.removed': {
    name: 'Limit removed',
    say: (detail) => `Removed ${limit(detail)}, which was ${detail.before}`,
  },
  'allowance.set': {
    name: 'Growth allowance set',
    say: ({ maturity, group, fraction, before }) =>
      `Set the growth allowance of maturity ${maturity}${ofGroup(group)} to ${percent(fraction)}${
        before === null ? '' : `, before ${percent(before)}`
      }`,
  },
  'allowance.removed': {
    name: 'Growth allowance removed',
    say: ({ maturity, group, before }) =>
      `Removed the growth allowance of maturity ${maturity}${ofGroup(group)} which was ${percent(before)}`,
  },
  'groups.changed': {
    name: 'Group breakdown changed',
    say: (detail) => GROUP_CHANGES[detail.change]?.(detail) ?? `Changed group ${detail.path}`,
  },
  'list.created': { name: 'List created', say: ({ code, title }) => `Created list ${code}, ${title}` },
  'list.declared': {
    name: 'List declared',
    say: ({ code, before, after }) => `Changed what list ${code} declares: ${changedMembers(before, after)}`,
  },
  'list.mapped': {
    name: 'Columns mapped',
    say: ({ list, file }) => `Said how the columns of ${file} are read into list ${list}`,
  },
  'upload.kept': {
    name: 'File kept',
    say: ({ list, file, sha256 }) =>
      `Uploaded ${file} for list ${list}, to be mapped, SHA-256 ${short(sha256)}`,
  },
  'upload.dropped': {
    name: 'File dropped',
    say: ({ list, file }) => `Dropped ${file}, which waited for a mapping into list ${list}`,
  },
  'list.carried': {
    name: 'List carried',
    say: ({ list, from, to, revision, reason }) =>
      `Carried list ${list} from frame issue ${from} to ${to}${revision === null ? '' : `, as revision ${revision}`}: ${reason}`,
  },
  'import.requested': {
    name: 'File uploaded',
    say: ({ list, file, sha256 }) => `Uploaded ${file} for list ${list}, SHA-256 ${short(sha256)}`,
  },
  'import.failed': {
    name: 'File refused',
    say: ({ list, file, problems }) =>
      `${file} for list ${list} was refused: ${problems === 1 ? '1 problem' : `${problems} problems`}`,
  },
  'import.cancelled': {
    name: 'Import cancelled',
    say: ({ list, file }) => `Called off the import of ${file} into list ${list}`,
  },
  'list.revised': {
    name: 'List revised',
    say: ({ list, number, origin, reason, rows: count, contentSha256 }) =>
      `Made revision ${number} of list ${list} by ${MADE_BY[origin] ?? origin}, ${rows(count)}, content ${short(contentSha256)}: ${reason}`,
  },
  'rotors.revised': {
    name: 'Rotating parts revised',
    say: ({ number, reason }) => `Made revision ${number} of the rotating parts: ${reason}`,
  },
  'configuration.created': {
    name: 'Configuration created',
    say: ({ code, title, build }) => `Created configuration ${code}, ${title}, for build ${build}`,
  },
  'configuration.changed': {
    name: 'Configuration changed',
    say: ({ code, what, version }) => `Changed configuration ${code}: ${what}. It is version ${version} now`,
  },
  'configuration.rolled-up': {
    name: 'Configuration rolled up',
    say: ({ code, version, inputSha256 }) =>
      `Rolled up configuration ${code}, version ${version}, from inputs ${short(inputSha256)}`,
  },
  'baseline.submitted': {
    name: 'Submitted for approval',
    say: ({ title, configuration, version }) =>
      `Submitted "${title}" for approval, from configuration ${configuration}, version ${version}`,
  },
  'baseline.returned': {
    name: 'Submission returned',
    say: ({ title, reason }) => `Returned "${title}": ${reason}`,
  },
  'baseline.signed': {
    name: 'Baseline signed',
    say: ({ title, number, digest }) => `Signed baseline ${number}, "${title}", digest ${short(digest)}`,
  },
  'baseline.superseded': {
    name: 'Baseline superseded',
    say: ({ number, by }) => `Baseline ${number} is superseded by baseline ${by}`,
  },
  'baseline.withdrawn': {
    name: 'Baseline withdrawn',
    say: ({ number, reason }) => `Withdrew baseline ${number}: ${reason}`,
  },
};

const isKind = (kind: string): kind is AuditKind => kind in WORDS;

export const AUDIT_KINDS = Object.keys(WORDS) as AuditKind[];

/** What a kind is called; the kind itself where this version of the product does not know it. */
export function kindName(kind: string): string {
  return isKind(kind) ? WORDS[kind].name : kind;
}

/**
 * An event in a sentence. `detail` is as the trail holds it: this version wrote it, or an older one whose kinds it still knows;
 * of a kind it does not know the detail is told as it stands.
 */
export function eventWords(kind: string, detail: unknown): string {
  return isKind(kind) ? sayKind(kind, detail) : JSON.stringify(detail);
}

function sayKind<K extends AuditKind>(kind: K, detail: unknown): string {
  return WORDS[kind].say(detail as AuditDetails[K]);
}

const percent = (fraction: number): string => `${Number((100 * fraction).toPrecision(6))} %`;

/** The members that differ between two objects, each with what it was and is. */
function changedMembers(before: unknown, after: unknown): string {
  const [old, now] = [members(before), members(after)];
  const names = [...new Set([...Object.keys(now), ...Object.keys(old)])];
  const changes = names.flatMap((name) => {
    const [was, is] = [JSON.stringify(old[name] ?? null), JSON.stringify(now[name] ?? null)];
    return was === is ? [] : [`${name} from ${was} to ${is}`];
  });
  return changes.length === 0 ? 'nothing that differs' : changes.join('; ');
}

const members = (value: unknown): Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null ? { ...value } : {};
