'use server';

import { pointsFormSchema } from '@/lib/contracts/rotors';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
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
