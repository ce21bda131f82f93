import { type Db } from '@/db/client';
import { programFrames } from '@/db/queries/program-frames';
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
 * @throws AppError invalid-input for a revision that is not there, or that is stated in a frame issue from which nobody knows how to get
 * to the configuration's; conflict when it has changed meanwhile.
 */
export async function pinRevisions(db: Db, input: PinRevisions): Promise<number> {
  const { configuration, revisions } = input;
  return changeConfiguration(db, { ...input, what: 'list revisions and rotating parts' }, async (trx) => {
    const frames = await programFrames(trx, configuration.program_id);
    const gapTo = (issueId: string): number | null => frames.gap(issueId, configuration.frame_issue_id);
    const found = await trx
      .selectFrom('lists')
      .innerJoin('list_revisions', 'list_revisions.list_id', 'lists.id')
      .select([
        'lists.id as list_id',
        'lists.code',
        'list_revisions.frame_issue_id',
        'list_revisions.id as revision_id',
        'list_revisions.number',
      ])
      .where('lists.program_id', '=', configuration.program_id)
      .execute();
    const pins = Object.entries(revisions).map(([code, number]) => {
      const pin = found.find((row) => row.code === code && row.number === number);
      if (pin === undefined) throw refused(code, `The list "${code}" has no revision ${number}.`);
      const gap = gapTo(pin.frame_issue_id);
      if (gap !== null) throw refused(code, `Revision ${number} of the list "${code}" ${outOfReach(gap)}`);
      return { configuration_id: configuration.id, list_id: pin.list_id, revision_id: pin.revision_id };
    });
    await trx.deleteFrom('configuration_lists').where('configuration_id', '=', configuration.id).execute();
    if (pins.length > 0) await trx.insertInto('configuration_lists').values(pins).execute();
    let rotorRevisionId: string | null = null;
    if (input.rotors !== null) {
      const rotors = await trx
        .selectFrom('rotor_revisions')
        .select(['id', 'frame_issue_id'])
        .where('program_id', '=', configuration.program_id)
        .where('number', '=', input.rotors)
        .executeTakeFirst();
      if (rotors === undefined)
        throw refused('rotors', `There is no revision ${input.rotors} of the rotating parts.`);
      const gap = rotors.frame_issue_id === null ? null : gapTo(rotors.frame_issue_id);
      if (gap !== null)
        throw refused('rotors', `Revision ${input.rotors} of the rotating parts ${outOfReach(gap)}`);
      rotorRevisionId = rotors.id;
    }
    await trx
      .updateTable('configurations')
      .set({ rotor_revision_id: rotorRevisionId })
      .where('id', '=', configuration.id)
      .execute();
  });
}

/** Why something that is stated in another issue cannot be converted. */
export const outOfReach = (gap: number): string =>
  `is stated in another frame issue, and issue ${gap} does not say how the one before lies in it. A chief engineer says so in the settings.`;

const refused = (field: string, message: string): AppError =>
  new AppError('invalid-input', message, { errors: [{ pointer: `/${field}`, message }] });
