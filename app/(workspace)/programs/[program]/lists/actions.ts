'use server';

import { redirect } from 'next/navigation';
import { declarationsFromBody } from '@/lib/contracts/list-declarations';
import { changeListSchema, newListSchema } from '@/lib/contracts/list-form';
import { serverDb } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { reachList } from '@/lib/server/lists/reach-list';
import { addList, saveList } from '@/lib/server/lists/save-list';

export const addListAction = programAction(
  'lists.keep',
  newListSchema,
  async ({ input, person, program }) => {
    const { code, title } = input;
    const declarations = declarationsFromBody(input.declarations);
    await addList(serverDb(), { person, programId: program.id, code, title, declarations });
    redirect(`/programs/${program.code}/lists/${code}/upload`);
  },
);

export const declareListAction = programAction(
  'lists.keep',
  changeListSchema,
  async ({ input, person, program }) => {
    const list = await reachList(serverDb(), program.id, input.list);
    const declarations = declarationsFromBody(input.declarations);
    await saveList(serverDb(), {
      person,
      programId: program.id,
      code: list.code,
      title: input.title,
      declarations,
    });
    redirect(`/programs/${program.code}/lists/${list.code}`);
  },
);
