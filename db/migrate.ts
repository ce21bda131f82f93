import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { runMigrations as runWorkerMigrations } from 'graphile-worker';
import { Kysely, type Migration, type MigrationProvider, Migrator, PostgresDialect, sql } from 'kysely';
import pg from 'pg';
import { APPLICATION_RIGHTS } from './grants';

const MIGRATIONS = path.join(path.dirname(fileURLToPath(import.meta.url)), '..', 'migrations');

class FolderOfMigrations implements MigrationProvider {
  async getMigrations(): Promise<Record<string, Migration>> {
    const found: Record<string, Migration> = {};
    for (const file of (await readdir(MIGRATIONS)).sort()) {
      if (!file.endsWith('.ts')) continue;
      const migration = (await import(pathToFileURL(path.join(MIGRATIONS, file)).href)) as Migration;
      found[file.slice(0, -3)] = migration;
    }
    return found;
  }
}

/**
 * Brings the schema to the newest migration, the job queue's own schema with it, and the application role's rights to
 * `APPLICATION_RIGHTS`. `ownerUrl` owns the tables; `applicationRole` is the role that the server connects as.
 * Returns the names of the migrations that ran. Throws on the first that fails; those before it stay.
 */
export async function migrateToLatest(ownerUrl: string, applicationRole: string): Promise<string[]> {
  const pool = new pg.Pool({ connectionString: ownerUrl, max: 2 });
  const db = new Kysely<unknown>({ dialect: new PostgresDialect({ pool }) });
  try {
    const { error, results } = await new Migrator({
      db,
      provider: new FolderOfMigrations(),
    }).migrateToLatest();
    if (error) throw error;
    await runWorkerMigrations({ connectionString: ownerUrl });
    await grantApplication(db, applicationRole);
    return (results ?? [])
      .filter((result) => result.status === 'Success')
      .map((result) => result.migrationName);
  } finally {
    await db.destroy();
  }
}

async function grantApplication(db: Kysely<unknown>, role: string): Promise<void> {
  const to = sql.id(role);
  await db.transaction().execute(async (trx) => {
    await sql`revoke create on schema public from public`.execute(trx);
    await sql`grant usage on schema public, graphile_worker to ${to}`.execute(trx);
    await sql`revoke all on all tables in schema public from ${to}`.execute(trx);
    for (const [table, rights] of Object.entries(APPLICATION_RIGHTS)) {
      await sql`grant ${sql.raw(rights.join(', '))} on ${sql.table(table)} to ${to}`.execute(trx);
    }
    // The queue keeps row level security on its tables; without a policy only their owner sees a job.
    await sql`grant select, insert, update, delete on all tables in schema graphile_worker to ${to}`.execute(
      trx,
    );
    await sql`grant usage on all sequences in schema graphile_worker to ${to}`.execute(trx);
    await sql`grant execute on all functions in schema graphile_worker to ${to}`.execute(trx);
    const tables = await sql<{ name: string }>`
      select c.relname as name from pg_class c join pg_namespace n on n.oid = c.relnamespace
      where n.nspname = 'graphile_worker' and c.relkind = 'r' and c.relrowsecurity
    `.execute(trx);
    for (const { name } of tables.rows) {
      const table = sql.id('graphile_worker', name);
      await sql`drop policy if exists application on ${table}`.execute(trx);
      await sql`create policy application on ${table} to ${to} using (true) with check (true)`.execute(trx);
    }
  });
}
