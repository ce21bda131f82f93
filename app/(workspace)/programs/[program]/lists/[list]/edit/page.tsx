import { type Metadata } from 'next';
import { subtotalsOf } from '@/db/queries/configurations';
import { placesInRevision } from '@/db/queries/drafts';
import { ownColumnsOf, pageOfView } from '@/db/queries/list-rows';
import { EDIT_KEYS } from '@/components/lists/editing/edit-keys';
import { EditStation } from '@/components/lists/editing/edit-station';
import { QueryRoot } from '@/components/lists/query-root';
import { ButtonLink } from '@/components/ui/button';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { ROWS_PER_PAGE } from '@/lib/contracts/list-rows';
import { listViewOf } from '@/lib/contracts/list-view';
import { toNumbersWithRest } from '@/lib/mass/account';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { serverDb } from '@/lib/server/database';
import { loadDraft } from '@/lib/server/lists/draft/load-draft';
import { loadPresence } from '@/lib/server/lists/draft/load-presence';
import { geometryOfRevision, reachRevision } from '@/lib/server/lists/reach-list';
import { revisionGroups } from '@/lib/server/lists/revision-groups';
import { totalsOfRevision } from '@/lib/server/lists/row-totals';
import { filterOf, orderOf, rowReader } from '@/lib/server/lists/row-view';
import { ProgramFrame } from '../../../frame';
import { orNotFound, requireList } from '../list-page';

export const metadata: Metadata = { title: 'Edit rows' };

/** The rows of a list in a grid, to be edited; edits are kept as a draft until they are saved as a revision. */
export default async function EditPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/lists/[list]/edit'>) {
  const { access, list, listHref, route } = await requireList(params, 'lists.keep');
  const above = <TextLink href={listHref}>{list.title}</TextLink>;
  const db = serverDb();
  if (list.last_revision === 0) {
    return (
      <ProgramFrame access={access} current="lists">
        <PageHead title="Edit rows" above={above} />
        <EmptyPlace
          title="This list has no revision yet"
          action={<ButtonLink href={`${listHref}/upload`}>Upload a file</ButtonLink>}
        >
          <p>There are no rows to edit. The first revision of a list comes from a file.</p>
        </EmptyPlace>
      </ProgramFrame>
    );
  }
  const draft = await loadDraft(db, list, access.person);
  const base = await orNotFound(() => reachRevision(db, list, String(draft?.base ?? list.last_revision)));
  const geometry = await geometryOfRevision(db, base);
  const view = listViewOf(new URLSearchParams());
  const page = { offset: 0, limit: ROWS_PER_PAGE };
  const stated = await revisionGroups(db, base.id);
  const asked = (await searchParams)['edit'];
  const item = typeof asked === 'string' ? asked : '';
  const place = (await placesInRevision(db, base.id, [item])).get(item);
  const [presence, subtotals, totals, own, { total, rows }] = await Promise.all([
    loadPresence(db, list, access.person),
    subtotalsOf(db, [base.id], base.frame_issue_id),
    totalsOfRevision(db, base.id, base.frame_issue_id, { declarations: base.declarations, geometry }),
    ownColumnsOf(db, base.id),
    pageOfView(db, base.id, filterOf(view, [], stated), orderOf(view, base.declarations), page),
  ]);
  return (
    <ProgramFrame access={access} current="lists" keys={EDIT_KEYS}>
      <PageHead
        title={`Edit ${list.title}`}
        above={above}
        lead={`From revision ${base.number}. What you do is kept as your draft; nobody else sees it until you save it as a revision.`}
      />
      <QueryRoot>
        <EditStation
          key={base.number}
          person={access.person.userId}
          open={place === undefined ? null : { item, place }}
          listHref={listHref}
          route={route}
          base={base.number}
          draft={draft}
          presence={presence}
          declarations={base.declarations}
          geometry={geometry}
          whole={toNumbersWithRest(rollUp(subtotals, [], geometry, NO_GROWTH).basicAccount)}
          first={{ offset: 0, total, rows: rows.map(rowReader(base.declarations, stated)) }}
          groups={totals.groups.map(({ group }) => group)}
          own={own}
        />
      </QueryRoot>
    </ProgramFrame>
  );
}
