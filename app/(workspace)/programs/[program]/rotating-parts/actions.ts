'use server';

import { redirect } from 'next/navigation';
import { rotorFormSchema, rotorRemovalSchema } from '@/lib/contracts/rotor-form';
import { pointsFormSchema } from '@/lib/contracts/rotors';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { editRotor } from '@/lib/server/rotors/edit-rotor';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';

export const savePointsAction = programAction(
  'rotors.keep',
  pointsFormSchema,
  async ({ input, person, program }) => {
    const { base, reason, points } = input;
    const { number } = await reviseRotors(serverDb(), {
      person,
      programId: program.id,
      base,
      reason,
      points,
    });
    return { message: `Revision ${number} is in force.` };
  },
);

export const saveRotorAction = programAction(
  'rotors.keep',
  rotorFormSchema,
  async ({ input, person, program }) => {
    const { rotor, inertiaUnit, ...change } = input;
    await editRotor(serverDb(), { person, programId: program.id, ...change, now: { rotor, inertiaUnit } });
    redirect(`/programs/${program.code}/rotating-parts`);
  },
);

export const removeRotorAction = programAction(
  'rotors.keep',
  rotorRemovalSchema,
  async ({ input, person, program }) => {
    await editRotor(serverDb(), { person, programId: program.id, ...input, now: null });
    redirect(`/programs/${program.code}/rotating-parts`);
  },
);
