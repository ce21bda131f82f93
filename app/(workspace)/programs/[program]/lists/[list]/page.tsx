import { type Metadata } from 'next';
import { Suspense } from 'react';
import { subtotalsOf } from '@/db/queries/configurations';
import { ownColumnsOf } from '@/db/queries/list-rows';
import { type ProgramFrames, programFrames } from '@/db/queries/program-frames';
import { exampleRow } from '@/db/queries/example-row';
import { type PinnedWhole, wholesWithRevision } from '@/db/queries/pinned-wholes';
import { findNewestImport, findRevisionAuthor, type List, type ListRevision } from '@/db/queries/lists';
import { openUploadsOf } from '@/db/queries/mappings';
import { placedFindings } from '@/components/configurations/placed-findings';
import { type FindingLine, FindingLines } from '@/components/findings/finding-lines';
import { Declared } from '@/components/lists/declared';
import { DraftOffer } from '@/components/lists/editing/draft-offer';
import { type FrameInForce, FrameInForceProvider } from '@/components/lists/frame-in-force';
import { FindingCounts } from '@/components/lists/finding-counts';
import { ListNotices } from '@/components/lists/list-notices';
import { counted } from '@/components/lists/list-words';
import { ListSketch } from '@/components/lists/list-sketch';
import { QueryRoot } from '@/components/lists/query-root';
import { type WholeOnPage } from '@/components/lists/row-shares';
import { RowsStation } from '@/components/lists/rows-station';
import { ButtonLink } from '@/components/ui/button';
import { Day } from '@/components/ui/day';
import { EmptyPlace } from '@/components/ui/empty-place';
import { TABLE_KEYS } from '@/components/ui/key-help';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { driversAsked, withDrivers } from '@/lib/drivers/drivers';
import { toNumbersWithRest } from '@/lib/mass/account';
import { listViewOf } from '@/lib/contracts/list-view';
import { CATEGORIES } from '@/lib/mass/component';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { noConversion } from '@/lib/mass/issue-conversion';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { serverDb } from '@/lib/server/database';
import { loadPresence } from '@/lib/server/lists/draft/load-presence';
import { reachRevision } from '@/lib/server/lists/reach-list';
import { typedExample } from '@/lib/server/lists/typed-example';
import { loadGroups } from '@/lib/server/lists/load-groups';
import { loadViews } from '@/lib/server/lists/views/load-views';
import { DriversComing, DriversHere } from '../../drivers-here';
import { ProgramFrame } from '../../frame';
import { orNotFound, requireList } from './list-page';

type Props = PageProps<'/programs/[program]/lists/[list]'>;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { list } = await requireList(params, 'lists.read');
  return { title: list.title };
}

/** One revision of a list: what the checks saw, what its groups add up to, its rows. */
export default async function ListPage({ params, searchParams }: Props) {
  const { access, list, home, listHref, route } = await requireList(params, 'lists.read');
  const keeps = access.can('lists.keep');
  const above = <TextLink href={home}>Lists</TextLink>;
  const db = serverDb();
  const frames = await programFrames(db, access.program.id);
  const [inForce] = frames.issues;
  const newestImport = await findNewestImport(db, list.id);
  const uploads = keeps ? await openUploadsOf(db, list.id) : [];
  const upload = (
    <ButtonLink kind={list.last_revision === 0 ? 'primary' : 'secondary'} href={`${listHref}/upload`}>
      Upload a file
    </ButtonLink>
  );
  if (list.last_revision === 0) {
    return (
      <ProgramFrame access={access} current="lists">
        <PageHead
          title={list.title}
          above={above}
          actions={
            keeps ? <ButtonLink href={`${listHref}/declarations`}>Change declarations</ButtonLink> : null
          }
        />
        <ListNotices listHref={listHref} shown={0} newest={0} import={newestImport} uploads={uploads} />
        <div className="grid items-start gap-8 lg:grid-cols-[2fr_1fr]">
          <EmptyPlace title="This list has no revision yet" action={keeps ? upload : null}>
            <p>Upload a CSV file: it is checked row by row and becomes revision 1, whole or not at all.</p>
          </EmptyPlace>
          <Section title="As declared">
            <Declared declarations={list.declarations} issue={frames.issue(list.frame_issue_id)} />
            <ListSketch
              declarations={list.declarations}
              frame={frames.geometry(list.frame_issue_id)}
              example={null}
            />
          </Section>
        </div>
      </ProgramFrame>
    );
  }
  const search = await searchParams;
  const asked = search['revision'];
  const number = typeof asked === 'string' ? asked : String(list.last_revision);
  const revision = await orNotFound(() => reachRevision(db, list, number));
  const issue = frames.issue(revision.frame_issue_id);
  const geometry = frames.geometry(issue.id);
  const [author, groups, views, own, source, pinned, row] = await Promise.all([
    findRevisionAuthor(db, revision.id),
    loadGroups(db, revision, listViewOf(new URLSearchParams()), 'group'),
    loadViews(db, list, access.person),
    ownColumnsOf(db, revision.id),
    listSource(list, revision, geometry),
    wholesWithRevision(db, revision.id, revision.frame_issue_id),
    exampleRow(db, revision.id),
  ]);
  const wholes = wholesOnPage(revision.number, source, pinned);
  const plain = () => new URLSearchParams({ revision: String(revision.number) });
  const { massUnit, lengthUnit, inertiaUnit } = revision.declarations;
  return (
    <ProgramFrame access={access} current="lists" keys={TABLE_KEYS}>
      <PageHead
        title={list.title}
        above={above}
        lead={
          <>
            Revision {revision.number}, {counted(revision.rows, 'row')}, <Day at={revision.created_at} time />
            , {author}: {revision.reason}
          </>
        }
        actions={
          <>
            {keeps ? <ButtonLink href={`${listHref}/edit`}>Edit rows</ButtonLink> : null}
            {keeps ? upload : null}
            <ButtonLink href={`${listHref}/revisions`}>See all revisions</ButtonLink>
            {keeps ? <ButtonLink href={`${listHref}/declarations`}>Change declarations</ButtonLink> : null}
          </>
        }
      />
      <ListNotices
        listHref={listHref}
        shown={revision.number}
        newest={list.last_revision}
        import={newestImport}
        uploads={uploads}
      />
      <QueryRoot>
        <DraftOffer start={await loadPresence(db, list, access.person)} route={route} listHref={listHref} />
      </QueryRoot>
      <div className="grid items-start gap-8 lg:grid-cols-[2fr_1fr]">
        <div className="grid min-w-0 gap-8">
          <Section title="Findings" aside={<FindingCounts findings={revision.findings} />}>
            <FindingLines findings={findingsOnPage(revision, list.code, access.program.code)} />
          </Section>
          <Section title="Where the list lies">
            <ListSketch
              declarations={revision.declarations}
              frame={geometry}
              example={row === undefined ? null : typedExample(row, revision.declarations)}
            />
          </Section>
        </div>
        <Section title="As declared">
          <Declared declarations={revision.declarations} issue={issue} />
          {inForce === undefined || inForce.id === issue.id ? null : (
            <p className="measure">
              Frame issue {inForce.number}, {inForce.title}, is in force. A configuration that stands in it
              converts this revision at roll-up.{' '}
              {keeps ? (
                <TextLink
                  href={`${listHref}/declarations`}
                >{`Carry the list to issue ${inForce.number}`}</TextLink>
              ) : null}
            </p>
          )}
        </Section>
      </div>
      <div id="rows" className="grid min-w-0 gap-8">
        <QueryRoot>
          <FrameInForceProvider frame={frameInForce(frames, issue.id)}>
            <RowsStation
              key={revision.number}
              listHref={listHref}
              listRoute={route}
              revisionRoute={`${route}/revisions/${revision.number}`}
              revision={revision.number}
              newest={list.last_revision}
              declarations={revision.declarations}
              geometry={geometry}
              wholes={wholes}
              totals={groups.whole}
              rows={revision.rows}
              groups={groups}
              views={views}
              findings={revision.findings.map(({ rule, message }) => ({ rule, message }))}
              own={own}
              file={revision.file_name}
              mayEdit={keeps}
            />
          </FrameInForceProvider>
        </QueryRoot>
      </div>
      <Suspense fallback={<DriversComing />}>
        <DriversHere
          source={Promise.resolve(source)}
          asked={driversAsked(search)}
          units={{ mass: massUnit, length: lengthUnit, inertia: inertiaUnit }}
          hrefOf={(drivers) => `${listHref}?${withDrivers(plain(), drivers).toString()}`}
          listsHref={home}
          of={`Revision ${revision.number}, approved rows without growth`}
        />
      </Suspense>
    </ProgramFrame>
  );
}

/** The issue in force, where a revision is stated in another and can be converted. */
function frameInForce(frames: ProgramFrames, statedIn: string): FrameInForce | null {
  const [inForce] = frames.issues;
  const conversion =
    inForce === undefined || inForce.id === statedIn ? null : frames.between(statedIn, inForce.id);
  if (inForce === undefined || conversion === null) return null;
  return { number: inForce.number, axes: conversion.to.axes, change: conversion.change };
}

/** All that a revision adds up, as the only thing there is. */
async function listSource(list: List, revision: ListRevision, geometry: AirframeGeometry) {
  const { id, number, declarations } = revision;
  return {
    geometry,
    revisions: [
      { id, code: list.code, title: list.title, number, declarations, conversion: noConversion(geometry) },
    ],
    subtotals: await subtotalsOf(serverDb(), [id], revision.frame_issue_id),
    condition: { categories: CATEGORIES, items: [] },
  };
}

/** The revision, and the conditions that it is part of. */
function wholesOnPage(
  revision: number,
  { subtotals, geometry }: Awaited<ReturnType<typeof listSource>>,
  pinned: readonly PinnedWhole[],
): WholeOnPage[] {
  return [
    {
      key: '',
      title: `Revision ${revision} of this list`,
      account: toNumbersWithRest(rollUp(subtotals, [], geometry, NO_GROWTH).basicAccount),
      categories: CATEGORIES,
    },
    ...pinned.map((one) => ({
      key: `${one.configuration}/${one.condition}`,
      title: `${one.configuration_title}, ${one.condition_title}`,
      account: toNumbersWithRest(one.account),
      categories: one.categories,
    })),
  ];
}

/** Where they were seen is the page itself. */
function findingsOnPage({ findings, number }: ListRevision, list: string, program: string): FindingLine[] {
  const where = { kind: 'list' as const, code: list, revision: number };
  const placed = findings.map((finding) => ({ ...finding, where }));
  return placedFindings(placed, program, [], null).map((line) => ({ ...line, seen: null }));
}
