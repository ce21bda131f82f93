import { type Metadata } from 'next';
import { revisionsOfList } from '@/db/queries/lists';
import { mappedImportsOf } from '@/db/queries/mappings';
import { CompareForm } from '@/components/lists/compare-form';
import { QueryRoot } from '@/components/lists/query-root';
import { RevisionTable } from '@/components/lists/revision-table';
import { EmptyPlace } from '@/components/ui/empty-place';
import { Pagination } from '@/components/ui/pagination';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { pageOf } from '@/lib/server/lists/page-of';
import { ProgramFrame } from '../../../frame';
import { requireList } from '../list-page';

export const metadata: Metadata = { title: 'Revisions' };

const PER_PAGE = 25;

/** Every revision of a list: who made it, when, why, from what, and how it differs from the one before. */
export default async function RevisionsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/lists/[list]/revisions'>) {
  const { access, list, listHref, route } = await requireList(params, 'lists.read');
  const [all, mapped] = await Promise.all([
    revisionsOfList(serverDb(), list.id),
    mappedImportsOf(serverDb(), list.id),
  ]);
  const page = pageOf((await searchParams)['page'], all.length, PER_PAGE, `${listHref}/revisions?`);
  return (
    <ProgramFrame access={access} current="lists">
      <PageHead title="Revisions" above={<TextLink href={listHref}>{list.title}</TextLink>} />
      {all.length === 0 ? (
        <EmptyPlace title="This list has no revision yet">
          <p>
            Each file that is accepted, and each set of edits that is saved, becomes a revision and stays.
          </p>
        </EmptyPlace>
      ) : (
        <QueryRoot>
          <RevisionTable
            newest={list.last_revision}
            mayRestore={access.can('lists.keep')}
            listHref={listHref}
            route={`${route}/revisions`}
            revisions={all.slice(page.offset, page.offset + PER_PAGE).map((revision) => ({
              number: revision.number,
              author: revision.author,
              at: revision.created_at,
              reason: revision.reason,
              rows: revision.rows,
              findings: revision.findings,
              file: revision.file_name,
              restoredFrom: revision.restored_from,
              mappedBy: mapped.get(revision.id) ?? null,
            }))}
          />
        </QueryRoot>
      )}
      {all.length > 1 ? (
        <Section title="Compare any two">
          <CompareForm action={`${listHref}/changes`} numbers={all.map(({ number }) => number)} />
        </Section>
      ) : null}
      {all.length > PER_PAGE ? <Pagination {...page.words} of="revisions" /> : null}
    </ProgramFrame>
  );
}
