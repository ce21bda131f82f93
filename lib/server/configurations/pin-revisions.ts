import { type Db } from '@/db/client';
import { AppError } from '@/lib/errors';
import { changeConfiguration, type ConfigurationChange } from './change-configuration';

export interface PinRevisions extends Omit<ConfigurationChange, 'what'> {
  /** List code -> revision number; a list that is not named is not part of the configuration. */
  readonly revisions: Readonly<Record<string, number>>;
  /** Revision number of the rotating parts, null for none. */
  readonly rotors: number | null;
}

/**
 * Sets which list revisions and which rotating parts a configuration is made of.
 * @throws AppError invalid-input for a revision that is not there or lies in another frame issue, conflict when it has changed meanwhile.
 */
export async function pinRevisions(db: Db, input: PinRevisions): Promise<number> {
  const { configuration, revisions } = input;
  return changeConfiguration(db, { ...input, what: 'list revisions and rotating parts' }, async (trx) => {
    const found = await trx
      .selectFrom('lists')
      .innerJoin('list_revisions', 'list_revisions.list_id', 'lists.id')
      .select([
        'lists.id as list_id',
        'lists.code',
        'lists.frame_issue_id',
        'list_revisions.id as revision_id',
        'list_revisions.number',
      ])
      .where('lists.program_id', '=', configuration.program_id)
      .execute();
    const pins = Object.entries(revisions).map(([code, number]) => {
      const pin = found.find((row) => row.code === code && row.number === number);
      if (pin === undefined) throw refused(code, `The list "${code}" has no revision ${number}.`);
      if (pin.frame_issue_id !== configuration.frame_issue_id)
        throw refused(code, `The list "${code}" lies in another frame issue than this configuration.`);
      return { configuration_id: configuration.id, list_id: pin.list_id, revision_id: pin.revision_id };
    });
    await trx.deleteFrom('configuration_lists').where('configuration_id', '=', configuration.id).execute();
    if (pins.length > 0) await trx.insertInto('configuration_lists').values(pins).execute();
    let rotorRevisionId: string | null = null;
    if (input.rotors !== null) {
      const rotors = await trx
        .selectFrom('rotor_revisions')
        .select('id')
        .where('program_id', '=', configuration.program_id)
        .where('number', '=', input.rotors)
        .executeTakeFirst();
      if (rotors === undefined)
        throw refused('rotors', `There is no revision ${input.rotors} of the rotating parts.`);
      rotorRevisionId = rotors.id;
    }
    await trx
      .updateTable('configurations')
      .set({ rotor_revision_id: rotorRevisionId })
      .where('id', '=', configuration.id)
      .execute();
  });
}

const refused = (field: string, message: string): AppError =>
  new AppError('invalid-input', message, { errors: [{ pointer: `/${field}`, message }] });
