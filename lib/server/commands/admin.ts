import { parseArgs } from 'node:util';
import { createDb, createPool } from '@/db/client';
import { emailSchema, nameSchema } from '@/lib/contracts/people';
import { makeAdmin } from '@/lib/server/people/make-admin';
import { env } from '@/lib/server/env';
import { fail, parseArgument } from './arguments';
import { findLocalServices } from './local-env';

const USAGE = 'npm run admin -- --email you@company.example --name "Your Name"';

/** Makes the first administrator, or another one, and prints the invitation link where a password is still to be chosen. */
async function main(): Promise<void> {
  const { values } = parseArgs({ options: { email: { type: 'string' }, name: { type: 'string' } } });
  const email = parseArgument('--email', emailSchema, values.email, USAGE);
  const name = parseArgument('--name', nameSchema, values.name ?? email.slice(0, email.indexOf('@')), USAGE);
  findLocalServices();
  const pool = createPool(env().DATABASE_URL, 1, fail);
  try {
    const path = await makeAdmin(createDb(pool), { email, name });
    console.log(`${email} is an administrator.`);
    if (path === null) console.log('They sign in with the password that they have.');
    else console.log(`To choose a password, open within 7 days: ${env().APP_URL}${path}`);
  } finally {
    await pool.end();
  }
}

main().catch(fail);
