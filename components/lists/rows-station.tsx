'use client';

import { useRouter, useSearchParams } from 'next/navigation';
import { useMemo, useState } from 'react';
import { Grid } from '@/components/data-table/grid';
import { Inspector } from '@/components/data-table/inspector';
import { columnsShown } from '@/components/data-table/view';
import { useUrlView } from '@/components/data-table/use-url-view';
import { counted } from '@/components/lists/list-words';
import { GroupsSection } from '@/components/lists/groups-section';
import {
  groupingColumns,
  isUsual,
  type RowColumn,
  rowColumns,
  totalCells,
} from '@/components/lists/row-columns';
import { RowBeside } from '@/components/lists/row-beside';
import { type WholeOnPage } from '@/components/lists/row-shares';
import { RowsBar } from '@/components/lists/rows-bar';
import { rowIdOf, useRowPages, useRowTotals } from '@/components/lists/use-row-pages';
import { SavedViews } from '@/components/lists/saved-views';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { type RowGroups } from '@/lib/contracts/list-groups';
import { type ListRow, type RowTotals } from '@/lib/contracts/list-rows';
import { isFiltered, type ListView, listViewOf, viewQuery } from '@/lib/contracts/list-view';
import { type SavedView } from '@/lib/contracts/saved-view';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface RowsStationProps {
  readonly listHref: string;
  /** The internal routes of the list, and of this revision. */
  readonly listRoute: string;
  readonly revisionRoute: string;
  readonly revision: number;
  readonly newest: number;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  readonly wholes: readonly WholeOnPage[];
  readonly totals: RowTotals;
  readonly rows: number;
  /** By group, of all rows. */
  readonly groups: RowGroups;
  readonly views: readonly SavedView[];
  readonly findings: readonly { readonly rule: string; readonly message: string }[];
  readonly own: readonly string[];
  readonly file: string | null;
  readonly mayEdit: boolean;
}

/** The rows of a revision: looked through, put in order and groups, opened. */
export function RowsStation(props: RowsStationProps) {
  const { declarations, revision, newest, revisionRoute, findings } = props;
  const router = useRouter();
  const params = useSearchParams();
  const [view, setView] = useUrlView();
  const query = useMemo(() => {
    const asked = new URLSearchParams(viewQuery(params));
    for (const [key, value] of [
      ['find', view.text],
      ['group', view.group],
      ['where', view.only?.column],
      ['is', view.only?.value],
      ['sort', view.sort ? `${view.sort.descending ? '-' : ''}${view.sort.column}` : ''],
    ] as const) {
      if (value) asked.set(key, value);
      else asked.delete(key);
    }
    return asked.toString();
  }, [params, view.text, view.group, view.only, view.sort]);
  const listView = useMemo(() => listViewOf(new URLSearchParams(query)), [query]);
  const filtered = isFiltered(listView);
  const pages = useRowPages(revisionRoute, query);
  const { totals, error } = useRowTotals(revisionRoute, query, props.totals, filtered);

  const [views, setViews] = useState(props.views);
  const [said, setSaid] = useState('');
  const plainHref = `${props.listHref}?revision=${revision}`;
  const mayEdit = props.mayEdit && revision === newest;
  const columns = useMemo(() => rowColumns(declarations, props.own), [declarations, props.own]);
  const visible = useMemo(
    () => columnsShown(columns, { shown: view.shown, hidden: view.hidden }, isUsual),
    [columns, view.shown, view.hidden],
  );
  const grouping = useMemo(() => groupingColumns(columns), [columns]);
  const beside = pages.loaded.find((row) => view.open !== null && rowIdOf(row) === view.open);

  return (
    <>
      <Section title="Rows" {...(said === '' ? {} : { aside: <span role="status">{said}</span> })}>
        <RowsBar
          columns={columns}
          visible={visible}
          view={view}
          onView={setView}
          only={onlyWords(listView, columns)}
          groups={props.groups.groups.map(({ value }) => value)}
          plainHref={plainHref}
          finding={findings.find(({ rule }) => rule === listView.finding)?.message ?? null}
          status={statusWords(pages.total, props.rows, filtered)}
          exportHref={(all) => `${revisionRoute}/export${all ? '' : `?${shownQuery(query, visible)}`}`}
          differs={query !== '' || view.shown.length > 0 || view.hidden.length > 0}
          views={
            <SavedViews
              views={views}
              onViews={setViews}
              route={`${props.listRoute}/views`}
              plainHref={plainHref}
            />
          }
        />
        {(pages.failure ?? error) ? (
          <Banner
            severity="blocker"
            word="Failed"
            live
            title="The rows could not be loaded"
            action={pages.failure ? <Button onClick={pages.failure.retry}>Try again</Button> : null}
          >
            <p>{pages.failure?.message ?? error?.message}</p>
          </Banner>
        ) : null}
        <div className={beside ? 'grid min-w-0 gap-4 lg:grid-cols-[minmax(0,1fr)_384px]' : 'grid min-w-0'}>
          <Grid<ListRow>
            caption={`Rows of revision ${revision}`}
            columns={visible}
            lines={pages.lines}
            shown={pages.loaded}
            total={props.rows}
            of="rows"
            view={view}
            onView={setView}
            loading={pages.total === null ? 'Loading rows' : null}
            totals={totals === null ? {} : totalCells(totals)}
            opens
            onPlain={() => router.push(plainHref)}
            subject={`${revision} ${query}`}
            onWindow={pages.onWindow}
            onCopyTooEarly={() =>
              setSaid('Some of these rows are not loaded yet. Scroll through them first, or export them.')
            }
          />
          {beside === undefined ? null : (
            <Inspector onClose={() => setView({ ...view, open: null })}>
              <RowBeside
                key={rowIdOf(beside)}
                row={beside}
                declarations={declarations}
                geometry={props.geometry}
                wholes={props.wholes}
                file={props.file}
                editHref={mayEdit ? `${props.listHref}/edit` : null}
              />
            </Inspector>
          )}
        </div>
        <p className="measure text-note text-ink-2">{footWords(totals)}</p>
      </Section>
      <GroupsSection
        columns={grouping}
        view={view}
        listView={listView}
        onView={setView}
        revisionRoute={revisionRoute}
        query={query}
        start={props.groups}
        declarations={declarations}
      />
    </>
  );
}

function statusWords(shown: number | null, all: number, filtered: boolean): string {
  if (shown === null) return 'Loading rows';
  return filtered ? `${shown} of ${counted(all, 'row')}` : counted(all, 'row');
}

/** The export of a view: its rows, and the columns shown. */
function shownQuery(query: string, visible: readonly RowColumn[]): string {
  const asked = new URLSearchParams(query);
  for (const { id } of visible) asked.append('column', id);
  return asked.toString();
}

/** `Supplier: Tern Metals`, where rows are chosen by the value of a column; null where they are not. */
function onlyWords(view: ListView, columns: readonly RowColumn[]): string | null {
  const column = columns.find(({ id }) => id === view.where);
  if (column === undefined) return null;
  return view.is === '' ? `${column.title} blank` : `${column.title}: ${view.is}`;
}

/** What the foot of the table adds up, and what it leaves out. */
function footWords(totals: RowTotals | null): string {
  if (totals === null) return '';
  const left = [
    totals.memoRows > 0 ? `${counted(totals.memoRows, 'memo row')} shown and not summed` : '',
    totals.waitingRows > 0 ? `${counted(totals.waitingRows, 'adjustment')} not approved and not summed` : '',
  ].filter(Boolean);
  const rows = `The foot sums ${counted(totals.rows, 'row')}: pieces with their mirror images, mass without growth, and the CG in list axes.`;
  return left.length === 0 ? rows : `${rows} Left out: ${left.join('; ')}.`;
}
