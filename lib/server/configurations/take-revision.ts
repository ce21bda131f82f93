import { type Db } from '@/db/client';
import { pinnedRevisions } from '@/db/queries/configurations';
import { type Person } from '@/lib/server/actor';
import { pinRevisions } from './pin-revisions';
import { type ReachedConfiguration } from './reach-configuration';

export interface TakeRevision {
  readonly person: Person;
  readonly configuration: ReachedConfiguration;
  /** The version that the person saw. */
  readonly version: number;
  /** Code of the list; null for the rotating parts. */
  readonly list: string | null;
  readonly revision: number;
}

/** Puts one list of a configuration, or its rotating parts, on another revision; everything else stays. Throws as `pinRevisions`. */
export async function takeRevision(db: Db, input: TakeRevision): Promise<number> {
  const { person, configuration, version, list, revision } = input;
  const pins = await pinnedRevisions(db, configuration.id);
  const revisions = Object.fromEntries(pins.map((pin) => [pin.list_code, pin.number]));
  return pinRevisions(db, {
    person,
    configuration,
    version,
    revisions: list === null ? revisions : { ...revisions, [list]: revision },
    rotors: list === null ? revision : configuration.rotor_revision_number,
  });
}
