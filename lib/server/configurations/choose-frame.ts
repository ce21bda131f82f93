import { type Db } from '@/db/client';
import { conditionsOf, pinnedRevisions } from '@/db/queries/configurations';
import { programFrames } from '@/db/queries/program-frames';
import { fieldError } from '@/lib/errors';
import { changeConfiguration, type ConfigurationChange } from './change-configuration';
import { outOfReach } from './pin-revisions';

/**
 * Puts a configuration into another frame issue of its program. The places of the items on board are converted here, once; lists and
 * rotating parts are converted at each roll-up.
 * @throws AppError invalid-input for an issue that is not there or that something of the configuration cannot be converted to;
 * conflict when it has changed meanwhile.
 */
export async function chooseFrame(
  db: Db,
  input: Omit<ConfigurationChange, 'what'> & { readonly frameIssue: number },
): Promise<number> {
  const { configuration, frameIssue } = input;
  const frames = await programFrames(db, configuration.program_id);
  const from = frames.issue(configuration.frame_issue_id);
  const to = frames.issues.find(({ number }) => number === frameIssue);
  if (to === undefined) throw fieldError('frame_issue', `The program has no frame issue ${frameIssue}.`);
  const conversion = frames.between(from.id, to.id);
  if (conversion === null)
    throw fieldError('frame_issue', `The configuration ${outOfReach(frames.gap(from.id, to.id) ?? 0)}`);
  const what = `frame issue ${from.number} to ${to.number}`;
  return changeConfiguration(db, { ...input, what }, async (trx) => {
    for (const pin of await pinnedRevisions(trx, configuration.id)) {
      const gap = frames.gap(pin.frame_issue_id, to.id);
      if (gap !== null) throw fieldError('frame_issue', `The list "${pin.list_code}" ${outOfReach(gap)}`);
    }
    const rotors = await trx
      .selectFrom('configurations')
      .innerJoin('rotor_revisions', 'rotor_revisions.id', 'configurations.rotor_revision_id')
      .select('rotor_revisions.frame_issue_id')
      .where('configurations.id', '=', configuration.id)
      .executeTakeFirst();
    const gap = rotors?.frame_issue_id ? frames.gap(rotors.frame_issue_id, to.id) : null;
    if (gap !== null) throw fieldError('frame_issue', `The rotating parts: this ${outOfReach(gap)}`);
    const items = (await conditionsOf(trx, configuration.id)).flatMap((condition) => condition.items);
    for (const { condition_id, position, place } of items) {
      const [x = NaN, y = NaN, z = NaN] = place;
      await trx
        .updateTable('condition_items')
        .set({ place: [...conversion.place([x, y, z])] })
        .where('condition_id', '=', condition_id)
        .where('position', '=', position)
        .execute();
    }
    await trx
      .updateTable('configurations')
      .set({ frame_issue_id: to.id })
      .where('id', '=', configuration.id)
      .execute();
  });
}
