import { type Metadata } from 'next';
import { GroupChangeTable } from '@/components/lists/group-change-table';
import { RestoreForm } from '@/components/lists/restore-form';
import { ChangeTable } from '@/components/lists/change-table';
import { counted } from '@/components/lists/list-words';
import { Pagination } from '@/components/ui/pagination';
import { PageHead, Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { compareGroups } from '@/lib/server/lists/compare-groups';
import { compareRevisions } from '@/lib/server/lists/compare-revisions';
import { declarationChanges } from '@/lib/server/lists/declaration-changes';
import { pageOf } from '@/lib/server/lists/page-of';
import { reachRevision } from '@/lib/server/lists/reach-list';
import { ProgramFrame } from '../../../frame';
import { restoreRevisionAction } from '../../actions';
import { orNotFound, requireList } from '../list-page';

export const metadata: Metadata = { title: 'Changes' };

const PER_PAGE = 100;

/** What changed between two revisions of a list, row by row and field by field. */
export default async function ChangesPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/lists/[list]/changes'>) {
  const { access, list, listHref } = await requireList(params, 'lists.read');
  const asked = await searchParams;
  const db = serverDb();
  const [before, after] = await orNotFound(() =>
    Promise.all([
      reachRevision(db, list, String(asked['from'])),
      reachRevision(db, list, String(asked['to'])),
    ]),
  );
  const here = `${listHref}/changes?from=${before.number}&to=${after.number}&`;
  const first = pageOf(asked['page'], Number.MAX_SAFE_INTEGER, PER_PAGE, here);
  const [{ counts, rows }, mass] = await Promise.all([
    compareRevisions(db, before, after, { offset: first.offset, limit: PER_PAGE }),
    compareGroups(db, before, after),
  ]);
  const mayRestore =
    access.can('lists.keep') && before.number === list.last_revision && after.number < before.number;
  const total = counts.added + counts.removed + counts.changed;
  const page = pageOf(asked['page'], total, PER_PAGE, here);
  const declared = declarationChanges(before.declarations, after.declarations);
  return (
    <ProgramFrame access={access} current="lists">
      <PageHead
        title={`What changed from revision ${before.number} to ${after.number}`}
        above={<TextLink href={`${listHref}/revisions`}>{`${list.title}, revisions`}</TextLink>}
        lead={`${counted(counts.added, 'row')} added, ${counts.removed} removed, ${counts.changed} changed. Figures are in the units and signs of revision ${after.number}.`}
      />
      {declared.length === 0 ? null : (
        <Section title="Declarations">
          <Table caption="Declarations that differ" captionHidden>
            <thead>
              <tr>
                <ColumnHead>Declaration</ColumnHead>
                <ColumnHead>Before</ColumnHead>
                <ColumnHead>After</ColumnHead>
              </tr>
            </thead>
            <tbody>
              {declared.map((change) => (
                <tr key={change.name}>
                  <RowHead>{change.name}</RowHead>
                  <Cell className="font-mono">{change.before}</Cell>
                  <Cell className="font-mono">{change.after}</Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        </Section>
      )}
      {mayRestore ? (
        <Section
          title={`Bring revision ${after.number} back`}
          lead={`It becomes revision ${before.number + 1}, with its own declarations, and this page shows what that changes. The revisions since stay as they are.`}
        >
          <RestoreForm
            action={restoreRevisionAction}
            program={access.program.code}
            list={list.code}
            revision={after.number}
            newest={before.number}
          />
        </Section>
      ) : null}
      <Section
        title="Mass, CG and tensor by group"
        lead="After less before, without growth. CG in airframe axes from the datum; moments of each about its own CG in body axes, products as positive integrals."
      >
        <GroupChangeTable
          whole={mass.whole}
          groups={mass.groups}
          hrefOf={(group) =>
            `${listHref}?${new URLSearchParams({ revision: String(after.number), group }).toString()}#rows`
          }
        />
      </Section>
      <Section title="Rows">
        {total === 0 ? (
          <p className="text-ink-2">No row differs.</p>
        ) : (
          <ChangeTable
            rows={rows}
            hrefOf={(item, kind) =>
              `${listHref}?${new URLSearchParams({
                revision: String(kind === 'removed' ? before.number : after.number),
                find: item,
                row: item,
              }).toString()}#rows`
            }
          />
        )}
        {total > PER_PAGE ? <Pagination {...page.words} of="rows that differ" /> : null}
      </Section>
    </ProgramFrame>
  );
}
