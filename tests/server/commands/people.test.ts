import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findTokenOwner } from '@/db/queries/tokens';
import { hashSecret } from '@/lib/server/auth/secret';
import { acceptInvitation } from '@/lib/server/people/accept-invitation';
import { ADDRESS, type PeopleUnderTest, peopleUnderTest } from '../../support/people';

let test: PeopleUnderTest;
beforeAll(async () => {
  test = await peopleUnderTest();
});
afterAll(() => test.close());

interface Ran {
  readonly code: number;
  readonly out: string;
  readonly err: string;
}

/** Runs a command as package.json does, against the test's database. */
async function run(command: 'admin' | 'token', ...args: string[]): Promise<Ran> {
  try {
    const file = `lib/server/commands/${command}.ts`;
    const ran = await promisify(execFile)(process.execPath, ['--import', 'tsx', file, ...args]);
    return { code: 0, out: ran.stdout, err: ran.stderr };
  } catch (error) {
    const failed = error as { code: number; stdout: string; stderr: string };
    return { code: failed.code, out: failed.stdout, err: failed.stderr };
  }
}

describe('npm run admin', () => {
  it('makes the first administrator and prints a link that lets them in', async () => {
    const { code, out } = await run('admin', '--email', 'First@Skerry.example', '--name', 'Una First');
    expect(code).toBe(0);
    const link = /http:\/\/polhode\.example\/invitation\/(\S+)/.exec(out);
    const joined = {
      secret: link?.[1] ?? '',
      name: 'Una First',
      password: 'correct horse battery',
      address: ADDRESS,
    };
    const id = await acceptInvitation(test.db, joined);
    expect(
      await test.db.selectFrom('users').select(['email', 'is_admin']).where('id', '=', id).executeTakeFirst(),
    ).toEqual({ email: 'first@skerry.example', is_admin: true });
  });

  it('says what is missing, in one line and how it is called', async () => {
    const { code, err } = await run('admin', '--name', 'Nobody');
    expect(code).toBe(1);
    expect(err).toMatch(/^--email: Enter a mail address\.\nUsage: npm run admin/);
  });
});

describe('npm run -s token', () => {
  it('prints nothing but a token that works', async () => {
    const { code, out, err } = await run(
      'token',
      '--email',
      'first@skerry.example',
      '--scopes',
      'baselines:read',
    );
    expect({ code, err }).toEqual({ code: 0, err: '' });
    expect(out).toMatch(/^polhode_[A-Za-z0-9_-]{43}\n$/);
    expect(await findTokenOwner(test.db, hashSecret(out.trim()), new Date())).toMatchObject({
      name: 'Una First',
      scopes: ['baselines:read'],
    });
  });

  it.each([
    [
      ['--email', 'nobody@skerry.example', '--scopes', 'baselines:read'],
      /Nobody who can sign in has the address/,
    ],
    [['--email', 'first@skerry.example', '--scopes', 'everything'], /--scopes: Use only baselines:read/],
    [
      ['--email', 'first@skerry.example', '--scopes', 'baselines:read', '--days', '366'],
      /--days: At most 365/,
    ],
    [['--email', 'first@skerry.example', '--scopes', 'lists:write'], /No role of yours/],
  ])('refuses %j in one line', async (args, words) => {
    const { code, out, err } = await run('token', ...args);
    expect({ code, out }).toEqual({ code: 1, out: '' });
    expect(err).toMatch(words);
    expect(err).not.toMatch(/\n\s+at /);
  });
});
