import { notFound } from 'next/navigation';
import { type List } from '@/db/queries/lists';
import { AppError } from '@/lib/errors';
import { type ProgramAction } from '@/lib/permissions';
import { serverDb } from '@/lib/server/database';
import { type ProgramAccess } from '@/lib/server/http/access';
import { type PageAccess, requireProgram } from '@/lib/server/http/page';
import { reachList } from '@/lib/server/lists/reach-list';

/** First line of a page of a list: who asks, the list, and the addresses of its pages and internal routes. */
export async function requireList(
  params: Promise<{ program: string; list: string }>,
  action: ProgramAction,
): Promise<{
  access: PageAccess & ProgramAccess;
  list: List;
  home: string;
  listHref: string;
  route: string;
}> {
  const { program, list: code } = await params;
  const access = await requireProgram(program, action);
  const list = await orNotFound(() => reachList(serverDb(), access.program.id, code));
  const home = `/programs/${access.program.code}/lists`;
  return {
    access,
    list,
    home,
    listHref: `${home}/${list.code}`,
    route: `/api/internal/programs/${access.program.code}/lists/${list.code}`,
  };
}

/** Shows "not found" where a look-up finds nothing. */
export async function orNotFound<T>(look: () => Promise<T>): Promise<T> {
  try {
    return await look();
  } catch (error) {
    if (error instanceof AppError && error.code === 'not-found') notFound();
    throw error;
  }
}
