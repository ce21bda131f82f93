import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Action, may, refusal, type Standing } from '@/lib/permissions';
import { hashSecret, newSecret } from '@/lib/server/auth/secret';
import { newId } from '@/lib/server/ids';
import { ENTRIES, type Entry } from '../access/table';
import { testWeb } from '../support/web';
import { type Role, ROLES, type WebPeople, webPeople } from '../support/web-people';

const { url } = testWeb();
let own: WebPeople;
let other: WebPeople;

beforeAll(async () => {
  own = await webPeople('access-own');
  other = await webPeople('access-other');
});
afterAll(async () => {
  await own.close();
  await other.close();
});

/** The address of a page or route in a program; what lies deeper in it is named, whether it is there or not. */
function addressOf(file: string, program: string): string {
  const segments = file
    .split('/')
    .slice(1, -1)
    .filter((segment) => !segment.startsWith('('))
    .map((segment) => (segment === '[program]' ? program : /^\[/.test(segment) ? '1' : segment));
  return `${url}/${segments.join('/')}`;
}

/** Whether what a page shows is named deeper in its address, or in its query: it is not there then, to those who may see it. */
const deeper = (file: string): boolean => /\[(?!program\])|baselines\/(submit|rows)\//.test(file);
const standingOf = (role: Role, inside: boolean): Standing => ({
  admin: role === 'admin',
  role: !inside || role === 'admin' || role === 'outsider' ? null : role,
});

async function status(entry: Entry, program: string, headers: Record<string, string>): Promise<number> {
  const method = entry.name === 'page' ? 'GET' : entry.name;
  const response = await fetch(addressOf(entry.file, program), {
    method,
    redirect: 'manual',
    headers: { ...headers, ...(method === 'GET' ? {} : { origin: url }) },
  });
  await response.arrayBuffer();
  return response.status;
}

/** What the guards of an entry answer, taken one after another; null when all let the request pass. */
function refused(entry: Entry, role: Role, inside: boolean): 403 | 404 | null {
  for (const { kind, action } of entry.asks) {
    const standing = standingOf(role, inside && kind !== 'site');
    const no = refusal(action as Action, standing);
    if (no !== null) return no === 'forbidden' ? 403 : 404;
  }
  return null;
}

async function expectAnswer(entry: Entry, role: Role, inside: boolean): Promise<void> {
  const answer = await status(entry, (inside ? own : other).program.code, { cookie: own.cookies[role] });
  const no = refused(entry, role, inside);
  if (no !== null) expect(answer).toBe(no);
  else if (deeper(entry.file)) expect([401, 403]).not.toContain(answer);
  else expect([401, 403, 404]).not.toContain(answer);
  expect(answer).toBeLessThan(500);
}

const bySession = ENTRIES.filter(
  ({ file, asks }) =>
    !file.endsWith('actions.ts') && asks.every(({ kind }) => kind === 'site' || kind === 'program'),
);

describe.each(bySession)('$name of $file', (entry) => {
  it('is closed without a session', async () => {
    const answer = await status(entry, own.program.code, {});
    expect(answer).toBe(entry.name === 'page' ? 307 : 401);
  });

  it.each(ROLES)('answers the %s of the program as the permission table says', async (role) => {
    await expectAnswer(entry, role, true);
  });

  it.each(ROLES)('answers the %s of one program in another as the permission table says', async (role) => {
    await expectAnswer(entry, role, false);
  });
});

const changing = bySession.filter(({ name }) => !['page', 'GET'].includes(name));

describe.each(changing)('$name of $file', (entry) => {
  it('is closed to other sites', async () => {
    const response = await fetch(addressOf(entry.file, own.program.code), {
      method: entry.name,
      headers: { cookie: own.cookies.weights, origin: 'https://evil.example' },
    });
    expect(response.status).toBe(403);
    expect(await response.json()).toMatchObject({ type: 'urn:polhode:problem:wrong-origin' });
  });
});

const byToken = ENTRIES.filter(({ asks }) => asks.every(({ kind }) => kind === 'token'));

describe.each(byToken)('$name of $file', (entry) => {
  const bearer = async (role: Role): Promise<string> => {
    const secret = newSecret();
    await own.db
      .insertInto('api_tokens')
      .values({
        id: newId(),
        user_id: own.ids[role],
        name: 'access test',
        token_hash: hashSecret(secret),
        hint: secret.slice(-4),
        scopes: ['baselines:read', 'lists:write'],
        program_ids: null,
        expires_at: new Date(Date.now() + 86_400_000),
        last_used_at: null,
        revoked_at: null,
      })
      .execute();
    return `Bearer ${secret}`;
  };

  it('is closed without a token, and a session’s cookie is none', async () => {
    expect(await status(entry, own.program.code, {})).toBe(401);
    expect(await status(entry, own.program.code, { cookie: own.cookies.weights })).toBe(401);
  });

  it.each(ROLES)('answers a token of the %s by the role of the moment', async (role) => {
    const authorization = await bearer(role);
    const action = entry.asks[0]?.action ?? '';
    for (const inside of [true, false]) {
      const answer = await status(entry, (inside ? own : other).program.code, { authorization });
      const standing = standingOf(role, inside);
      expect(answer).toBeLessThan(500);
      if (action === '') expect([401, 403]).not.toContain(answer);
      else if (standing.role === null) expect(answer).toBe(404);
      else if (may(action as Action, standing)) expect([401, 403]).not.toContain(answer);
      else expect(answer).toBe(403);
    }
  });
});
