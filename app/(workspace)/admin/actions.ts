'use server';

import { personChoiceSchema, personSchema } from '@/lib/contracts/people';
import { newProgramSchema } from '@/lib/contracts/program';
import { serverDb } from '@/lib/server/database';
import { siteAction } from '@/lib/server/http/action';
import { invitePerson } from '@/lib/server/people/invite-person';
import { resendInvitation } from '@/lib/server/people/resend-invitation';
import { setPersonDisabled } from '@/lib/server/people/set-disabled';
import { createProgram } from '@/lib/server/programs/create-program';

export const invitePersonAction = siteAction('people.keep', personSchema, async ({ input, person }) => {
  const { email, name, admin } = input;
  await invitePerson(serverDb(), { person, email, name, admin: admin === 'on' });
  return { message: `An invitation is on its way to ${email}.` };
});

export const resendInvitationAction = siteAction(
  'people.keep',
  personChoiceSchema,
  async ({ input, person }) => {
    const email = await resendInvitation(serverDb(), { person, userId: input.userId });
    return { message: `On its way to ${email}.` };
  },
);

export const disablePersonAction = siteAction(
  'people.keep',
  personChoiceSchema,
  async ({ input, person }) => {
    await setPersonDisabled(serverDb(), { person, userId: input.userId, disabled: true });
  },
);

export const enablePersonAction = siteAction('people.keep', personChoiceSchema, async ({ input, person }) => {
  await setPersonDisabled(serverDb(), { person, userId: input.userId, disabled: false });
});

export const createProgramAction = siteAction(
  'programs.create',
  newProgramSchema,
  async ({ input, person }) => {
    const { code, title, chiefEmail, chiefName } = input;
    await createProgram(serverDb(), { person, code, title, chief: { email: chiefEmail, name: chiefName } });
    return { message: `The program ${title} is made, and ${chiefEmail} leads it.` };
  },
);
