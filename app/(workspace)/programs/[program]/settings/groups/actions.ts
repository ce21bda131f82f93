'use server';

import {
  addGroupSchema,
  groupChoiceSchema,
  moveGroupSchema,
  recodeGroupSchema,
  ticked,
} from '@/lib/contracts/group-forms';
import { joinedPath } from '@/lib/groups/breakdown';
import { pathsToAdd } from '@/lib/groups/choices';
import { USUAL_GROUPS } from '@/lib/groups/usual-groups';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { changeGroups } from '@/lib/server/programs/change-groups';
import { groupBreakdownOf } from '@/db/queries/settings';

export const addGroupAction = programAction(
  'groups.keep',
  addGroupSchema,
  async ({ input, person, program }) => {
    const path = joinedPath(input.above, input.name);
    await changeGroups(serverDb(), {
      person,
      programId: program.id,
      changes: [{ kind: 'added', path, to: null, code: input.code }],
    });
    return { message: `${path} is a group.` };
  },
);

/** From the usual groups or from what the lists have: those that are ticked, and the ones above them. */
export const takeGroupsAction = programAction('groups.keep', ticked, async ({ input, person, program }) => {
  const breakdown = await groupBreakdownOf(serverDb(), program.id);
  const paths = pathsToAdd(breakdown, input);
  const codeOf = (path: string): string | null => {
    const code = USUAL_GROUPS.find((usual) => usual.path === path)?.code ?? null;
    return breakdown.nodes().some((node) => node.code === code) ? null : code;
  };
  await changeGroups(serverDb(), {
    person,
    programId: program.id,
    changes: paths.map((path) => ({ kind: 'added', path, to: null, code: codeOf(path) })),
  });
  return { message: paths.length === 1 ? '1 group was added.' : `${paths.length} groups were added.` };
});

export const moveGroupAction = programAction(
  'groups.keep',
  moveGroupSchema,
  async ({ input, person, program }) => {
    const to = joinedPath(input.above, input.name);
    await changeGroups(serverDb(), {
      person,
      programId: program.id,
      changes: [{ kind: 'moved', path: input.path, to, code: null }],
    });
    return { message: `${input.path} is ${to} from now on.` };
  },
);

export const recodeGroupAction = programAction(
  'groups.keep',
  recodeGroupSchema,
  async ({ input, person, program }) => {
    await changeGroups(serverDb(), {
      person,
      programId: program.id,
      changes: [{ kind: 'recoded', path: input.path, to: null, code: input.code }],
    });
    return { message: 'The code is set.' };
  },
);

export const removeGroupAction = programAction(
  'groups.keep',
  groupChoiceSchema,
  async ({ input, person, program }) => {
    await changeGroups(serverDb(), {
      person,
      programId: program.id,
      changes: [{ kind: 'removed', path: input.path, to: null, code: null }],
    });
  },
);
