import { z } from 'zod';
import { rotorFromTexts } from '@/lib/ingest/one-rotor';
import { ROTOR_COLUMNS, type RotorColumn } from '@/lib/ingest/rotor-row';
import { INERTIA_UNITS } from '@/lib/units/table';
import { reasonSchema } from './codes';
import { wholeField } from './form-fields';

const revision = { base: wholeField(0), reason: reasonSchema };

const cell = z.string().max(10_000).default('');
const cells = Object.fromEntries(ROTOR_COLUMNS.map((column) => [column, cell])) as Record<
  RotorColumn,
  typeof cell
>;

/**
 * One rotor as typed, in the columns of its file. `was` is the name of the rotor that is changed, blank for a new one; `base` the
 * revision that the person saw, 0 before the first.
 */
export const rotorFormSchema = z
  .object({
    ...revision,
    was: z.string().max(10_000).default(''),
    inertia_unit: z.enum(INERTIA_UNITS, 'Declare the unit of the inertias: it is never guessed.'),
    ...cells,
  })
  .transform(({ base, reason, was, inertia_unit: inertiaUnit, ...texts }, context) => {
    const { rotor, problems } = rotorFromTexts(texts, inertiaUnit);
    for (const { column, message } of problems) context.addIssue({ code: 'custom', path: [column], message });
    return rotor === null ? z.NEVER : { base, reason, was: was === '' ? null : was, inertiaUnit, rotor };
  });

export const rotorRemovalSchema = z.object({ ...revision, was: z.string().min(1) });
