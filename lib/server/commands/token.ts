import { parseArgs } from 'node:util';
import { z } from 'zod';
import { createDb, createPool } from '@/db/client';
import { findPersonByEmail } from '@/db/queries/people';
import { emailSchema } from '@/lib/contracts/people';
import { env } from '@/lib/server/env';
import { makeToken, TOKEN_DAYS_AT_MOST } from '@/lib/server/tokens/make-token';
import { TOKEN_SCOPES } from '@/lib/token-scopes';
import { fail, parseArgument } from './arguments';
import { findLocalServices } from './local-env';

const USAGE =
  'npm run -s token -- --email you@company.example --scopes baselines:read,lists:write [--days 90] [--program code] [--name text]';

const daysSchema = z.coerce
  .number('Give a whole number of days.')
  .int('Give a whole number of days.')
  .min(1, 'At least 1.')
  .max(TOKEN_DAYS_AT_MOST, `At most ${TOKEN_DAYS_AT_MOST}.`);

const scopesSchema = z
  .string(`Name one or more of ${TOKEN_SCOPES.join(', ')}.`)
  .transform((text) => text.split(','))
  .pipe(z.array(z.enum(TOKEN_SCOPES, `Use only ${TOKEN_SCOPES.join(', ')}.`)));

/** Makes a token for a person, as they could on their account page, and prints nothing but it. */
async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      email: { type: 'string' },
      scopes: { type: 'string' },
      days: { type: 'string', default: '90' },
      program: { type: 'string', multiple: true },
      name: { type: 'string', default: 'command line' },
    },
  });
  const email = parseArgument('--email', emailSchema, values.email, USAGE);
  const scopes = parseArgument('--scopes', scopesSchema, values.scopes, USAGE);
  const days = parseArgument('--days', daysSchema, values.days, USAGE);
  findLocalServices();
  const pool = createPool(env().DATABASE_URL, 1, fail);
  try {
    const db = createDb(pool);
    const owner = await findPersonByEmail(db, email);
    if (!owner || owner.disabledAt !== null)
      throw new Error(`Nobody who can sign in has the address ${email}.`);
    const person = { userId: owner.id, address: 'command line' };
    const programs = values.program ?? null;
    console.log(await makeToken(db, { person, name: values.name, scopes, programs, days }));
  } finally {
    await pool.end();
  }
}

main().catch(fail);
