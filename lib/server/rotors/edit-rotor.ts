import { type Db } from '@/db/client';
import { AppError } from '@/lib/errors';
import { keepUntyped } from '@/lib/ingest/one-rotor';
import { type Rotor } from '@/lib/rotors/rotor';
import { type Person } from '@/lib/server/actor';
import { type InertiaUnit } from '@/lib/units/table';
import { reviseRotors } from './revise-rotors';

interface EditRotor {
  readonly person: Person;
  readonly programId: string;
  readonly base: number;
  readonly reason: string;
  /** The rotor that is changed or removed; null for a new one. */
  readonly was: string | null;
  /** What it becomes, and the unit in which its inertias were typed; null to remove it. */
  readonly now: { readonly rotor: Rotor; readonly inertiaUnit: InertiaUnit } | null;
}

/**
 * Adds, changes or removes one rotor: the next revision holds the others as they are.
 * @throws AppError conflict when someone else has made a revision since `base`; invalid-input naming the field when another rotor has
 * the name.
 */
export async function editRotor(db: Db, input: EditRotor): Promise<{ id: string; number: number }> {
  const { programId, base, was, now } = input;
  const rotors = await rotorsOf(db, programId, base);
  const before = rotors.find(({ rotor }) => rotor === was);
  if (was !== null && before === undefined)
    throw new AppError('not-found', `Revision ${base} has no rotor called ${was}.`);
  if (now !== null && rotors.some((one) => one !== before && one.rotor === now.rotor.rotor))
    throw new AppError('invalid-input', 'Two rotors would have one name.', {
      errors: [
        {
          pointer: '/rotor',
          message: `There is a rotor called ${now.rotor.rotor} already. Give this one another name.`,
        },
      ],
    });
  const after = now && (before ? keepUntyped(before, now.rotor, now.inertiaUnit) : now.rotor);
  const changed =
    before === undefined
      ? [...rotors, ...(after === null ? [] : [after])]
      : rotors.flatMap((one) => (one !== before ? [one] : after === null ? [] : [after]));
  return reviseRotors(db, {
    person: input.person,
    programId,
    base,
    reason: input.reason,
    rotors: changed,
  });
}

/** Of one revision; it never changes, and `reviseRotors` refuses one that is no longer the newest. */
async function rotorsOf(db: Db, programId: string, number: number): Promise<readonly Rotor[]> {
  const revision = await db
    .selectFrom('rotor_revisions')
    .select('rotors')
    .where('program_id', '=', programId)
    .where('number', '=', number)
    .executeTakeFirst();
  return revision?.rotors ?? [];
}
