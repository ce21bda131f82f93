'use server';

import { memberChoiceSchema, memberRoleSchema, newMemberSchema } from '@/lib/contracts/people';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { addMember } from '@/lib/server/programs/add-member';
import { changeMemberRole, removeMember } from '@/lib/server/programs/change-member';

export const addMemberAction = programAction(
  'members.keep',
  newMemberSchema,
  async ({ input, person, program }) => {
    const { name, invited } = await addMember(serverDb(), { person, program, ...input, name: input.name });
    return {
      message: invited
        ? `${name} is a member. An invitation is on its way to ${input.email}.`
        : `${name} is a member.`,
    };
  },
);

export const changeMemberRoleAction = programAction(
  'members.keep',
  memberRoleSchema,
  async ({ input, person, program }) => {
    await changeMemberRole(serverDb(), { person, programId: program.id, ...input });
  },
);

export const removeMemberAction = programAction(
  'members.keep',
  memberChoiceSchema,
  async ({ input, person, program }) => {
    await removeMember(serverDb(), { person, programId: program.id, userId: input.userId });
  },
);
