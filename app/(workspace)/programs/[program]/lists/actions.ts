'use server';

import { redirect } from 'next/navigation';
import { declarationsFromBody } from '@/lib/contracts/list-declarations';
import { carrySchema, changeListSchema, newListSchema, restoreSchema } from '@/lib/contracts/list-form';
import { serverDb, writerPool } from '@/lib/server/database';
import { programAction } from '@/lib/server/http/action';
import { carryList } from '@/lib/server/lists/carry-list';
import { reachList } from '@/lib/server/lists/reach-list';
import { restoreRevision } from '@/lib/server/lists/restore-revision';
import { addList, saveList } from '@/lib/server/lists/save-list';

export const addListAction = programAction(
  'lists.keep',
  newListSchema,
  async ({ input, person, program }) => {
    const { code, title } = input;
    const declarations = declarationsFromBody(input.declarations);
    const { frameIssue } = input;
    await addList(serverDb(), {
      person,
      programId: program.id,
      code,
      title,
      declarations,
      ...(frameIssue === undefined ? {} : { frameIssue }),
    });
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
      ...(input.frameIssue === undefined ? {} : { frameIssue: input.frameIssue }),
    });
    redirect(`/programs/${program.code}/lists/${list.code}`);
  },
);

export const carryListAction = programAction(
  'lists.keep',
  carrySchema,
  async ({ input, person, program }) => {
    const list = await reachList(serverDb(), program.id, input.list);
    await carryList(
      { pool: writerPool(), db: serverDb() },
      { person, list, baseRevision: input.newest, frameIssue: input.frame_issue, reason: input.reason },
    );
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
