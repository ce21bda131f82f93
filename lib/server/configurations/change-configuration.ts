import { type Transaction } from 'kysely';
import { type Db } from '@/db/client';
import { type Configuration } from '@/db/queries/configurations';
import { type Database } from '@/db/schema/database';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';

export interface ConfigurationChange {
  readonly person: Person;
  readonly configuration: Configuration;
  /** The version that the person saw; the change is refused when it is no longer the newest. */
  readonly version: number;
  /** For the trail: what was changed, in a few words. */
  readonly what: string;
}

/**
 * Runs a change of a configuration in one transaction: `write` makes it, the version goes up by one and the trail has it.
 * @throws AppError conflict when the configuration has changed since the person saw it.
 */
export async function changeConfiguration(
  db: Db,
  input: ConfigurationChange,
  write: (trx: Transaction<Database>) => Promise<void>,
): Promise<number> {
  const { person, configuration } = input;
  return db.transaction().execute(async (trx) => {
    const updated = await trx
      .updateTable('configurations')
      .set({ version: input.version + 1 })
      .where('id', '=', configuration.id)
      .where('version', '=', input.version)
      .executeTakeFirstOrThrow();
    if (updated.numUpdatedRows !== 1n)
      throw new AppError(
        'conflict',
        'Someone else has changed this configuration meanwhile. Nothing was saved: reload the page, then make your change again.',
      );
    await write(trx);
    await recordEvent(trx, {
      scope: configuration.program_id,
      actor: person,
      kind: 'configuration.changed',
      subject: configuration.code,
      detail: { code: configuration.code, what: input.what, version: input.version + 1 },
    });
    return input.version + 1;
  });
}
