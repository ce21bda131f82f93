import path from 'node:path';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type Action, may, type MemberRole } from '@/lib/permissions';
import { sessionCookie, startSession } from '@/lib/server/auth/session';
import { env } from '@/lib/server/env';
import { ENTRIES } from '../access/table';
import { type ProgramUnderTest, programUnderTest } from '../support/program';

/** The request that an action believes to be in: Next's own is only there while it serves one. */
const request = vi.hoisted(() => ({ cookies: new Map<string, string>(), headers: new Headers() }));
vi.mock('next/headers', () => ({
  headers: () => Promise.resolve(request.headers),
  cookies: () =>
    Promise.resolve({
      get: (name: string) => {
        const value = request.cookies.get(name);
        return value === undefined ? undefined : { name, value };
      },
      set: (name: string, value: string) => request.cookies.set(name, value),
    }),
}));
vi.mock('next/cache', () => ({ refresh: () => undefined, revalidatePath: () => undefined }));

const OTHER = 'other-hopper';
let test: ProgramUnderTest;

beforeAll(async () => {
  test = await programUnderTest();
  await test.db
    .insertInto('programs')
    .values({ id: OTHER, code: OTHER, title: 'Other hopper', created_by: test.crew.admin.userId })
    .execute();
});
afterAll(() => test.close());

beforeEach(() => {
  request.cookies.clear();
  request.headers = new Headers({ origin: env().APP_URL, 'x-polhode-peer': '192.0.2.1' });
});

async function signInAs(who: Who): Promise<void> {
  const secret = await startSession(test.pool, test.crew[who].userId, '192.0.2.1');
  request.cookies.set(sessionCookie(env().APP_URL).name, secret);
}

/** What an action answers to a form that holds nothing but the program: it gets as far as its guard lets it, then fails on the rest. */
async function outcome(file: string, name: string, program: string): Promise<string> {
  const actions = (await import(path.resolve(file))) as Record<string, FormAction<never>>;
  const form = new FormData();
  form.set('program', program);
  const call = actions[name];
  if (call === undefined) throw new Error(`${file} exports no ${name}`);
  try {
    const state = await call(IDLE, form);
    return state.status === 'failed' ? (state.message ?? '') : 'passed';
  } catch (error) {
    const digest = (error as { digest?: string }).digest ?? '';
    if (!digest.startsWith('NEXT_REDIRECT')) throw error;
    return digest.includes('/sign-in') ? 'sign in' : 'passed';
  }
}

const CREW = ['admin', 'chief', 'weights', 'simulation'] as const;
type Who = (typeof CREW)[number];
const roleOf = (who: Who): MemberRole | null => (who === 'admin' ? null : who);

const NOT_ADMIN = 'Only an administrator may do this.';
const NO_PROGRAM = 'There is no such program.';
const WRONG_ROLE = /^Your role in .* does not allow this/;
const refused = (said: string): boolean => said === NOT_ADMIN || said === NO_PROGRAM || WRONG_ROLE.test(said);

const guarded = ENTRIES.filter(
  ({ file, asks }) => file.endsWith('actions.ts') && asks.some(({ kind }) => kind !== 'public'),
).map((entry) => ({
  ...entry,
  kind: entry.asks[0]?.kind ?? '',
  action: (entry.asks[0]?.action ?? '') as Action,
}));

describe.each(guarded)('$name of $file', ({ file, name, kind, action }) => {
  it('leads to sign-in without a session', async () => {
    expect(await outcome(file, name, test.program.code)).toBe('sign in');
  });

  it('refuses a form that another site sent', async () => {
    await signInAs('admin');
    request.headers.set('origin', 'https://evil.example');
    expect(await outcome(file, name, test.program.code)).toMatch(/did not come from/);
    request.headers.delete('origin');
    expect(await outcome(file, name, test.program.code)).toMatch(/did not come from/);
  });

  it.each(CREW)('answers the %s of the program as the permission table says', async (who) => {
    await signInAs(who);
    const said = await outcome(file, name, test.program.code);
    const standing = { admin: who === 'admin', role: kind === 'program' ? roleOf(who) : null };
    if (may(action, standing)) expect(refused(said), said).toBe(false);
    else if (kind === 'site') expect(said).toBe(NOT_ADMIN);
    else if (standing.role === null) expect(said).toBe(NO_PROGRAM);
    else expect(said).toMatch(WRONG_ROLE);
  });
});

const ofPrograms = guarded.filter(({ kind }) => kind === 'program');

describe.each(ofPrograms)('$name of $file', ({ file, name, action }) => {
  it.each(CREW)('tells the %s of one program nothing of another', async (who) => {
    await signInAs(who);
    const said = await outcome(file, name, OTHER);
    if (may(action, { admin: who === 'admin', role: null })) expect(refused(said), said).toBe(false);
    else expect(said).toBe(NO_PROGRAM);
  });
});
