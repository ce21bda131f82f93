import { type Db } from '@/db/client';

/** Every revision of every list of a program: lists by code, the newest revision of each first. */
export function revisionsOfProgram(db: Db, programId: string) {
  return db
    .selectFrom('list_revisions')
    .innerJoin('lists', 'lists.id', 'list_revisions.list_id')
    .select([
      'lists.code as list_code',
      'lists.title as list_title',
      'list_revisions.number',
      'list_revisions.frame_issue_id',
      'list_revisions.reason',
      'list_revisions.rows',
      'list_revisions.created_at',
    ])
    .where('lists.program_id', '=', programId)
    .orderBy('lists.code')
    .orderBy('list_revisions.number', 'desc')
    .execute();
}
