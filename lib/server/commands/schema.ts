import { migrateToLatest } from '@/db/migrate';

/**
 * Brings the database to the newest migration: the owner's connection is MIGRATION_DATABASE_URL, the role that is
 * given its rights is the one in DATABASE_URL. Returns the names of the migrations that ran.
 */
export async function migrate(): Promise<string[]> {
  const owner = process.env['MIGRATION_DATABASE_URL'];
  const application = process.env['DATABASE_URL'];
  if (!owner || !application) throw new Error('MIGRATION_DATABASE_URL and DATABASE_URL must both be set.');
  return migrateToLatest(owner, decodeURIComponent(new URL(application).username));
}
