'use server';

import { redirect } from 'next/navigation';
import { declarationsFromBody } from '@/lib/contracts/list-declarations';
import { changeListSchema, newListSchema, restoreSchema } from '@/lib/contracts/list-form';
import { serverDb, writerPool } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { reachList } from '@/lib/server/lists/reach-list';
import { restoreRevision } from '@/lib/server/lists/restore-revision';
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

export const restoreRevisionAction = programAction(
  'lists.keep',
  restoreSchema,
  async ({ input, person, program }) => {
    const list = await reachList(serverDb(), program.id, input.list);
    const number = await restoreRevision(
      { pool: writerPool(), db: serverDb() },
      { person, list, number: input.revision, newest: input.newest, reason: input.reason },
    );
    redirect(`/programs/${program.code}/lists/${list.code}?revision=${number}`);
  },
);
