import { type Db } from '@/db/client';

export interface BuildInList {
  readonly programId: string;
  readonly code: string;
  readonly title: string;
  readonly isDefault: boolean;
}

/** The builds of these programs, the default one of each first. */
export async function buildsOfPrograms(db: Db, programIds: readonly string[]): Promise<BuildInList[]> {
  if (programIds.length === 0) return [];
  return db
    .selectFrom('builds')
    .select(['program_id as programId', 'code', 'title', 'is_default as isDefault'])
    .where('program_id', 'in', programIds)
    .orderBy('is_default', 'desc')
    .orderBy('code')
    .execute();
}
