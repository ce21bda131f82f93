'use client';

import { useRouter, useSearchParams } from 'next/navigation';
import { useMemo, useRef, useState } from 'react';
import { Grid } from '@/components/data-table/grid';
import { Inspector } from '@/components/data-table/inspector';
import { columnsShown } from '@/components/data-table/view';
import { useUrlView } from '@/components/data-table/use-url-view';
import { counted } from '@/components/lists/list-words';
import { GroupsSection } from '@/components/lists/groups-section';
import { PendingPanel } from '@/components/lists/pending-panel';
import {
  groupingColumns,
  isUsual,
  type RowColumn,
  rowColumns,
  totalCells,
} from '@/components/lists/row-columns';
import { type Beside, RowBeside } from '@/components/lists/row-beside';
import { type WholeOnPage } from '@/components/lists/row-shares';
import { RowsBar } from '@/components/lists/rows-bar';
import { usePendingEdits } from '@/components/lists/use-pending-edits';
import { rowIdOf, useRowPages, useRowTotals } from '@/components/lists/use-row-pages';
import { SavedViews } from '@/components/lists/saved-views';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { type EditProblem, EDITS_AT_ONCE, itemOfEdit, type RowEdit } from '@/lib/contracts/list-edits';
import { type RowGroups } from '@/lib/contracts/list-groups';
import { type ListRow, type RowTotals } from '@/lib/contracts/list-rows';
import { isFiltered, type ListView, listViewOf, viewQuery } from '@/lib/contracts/list-view';
import { type SavedView } from '@/lib/contracts/saved-view';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type ListDeclarations } from '@/lib/mass/declarations';

export interface RowsStationProps {
  /** `program/list`: what the edits kept in the browser belong to. */
  readonly listKey: string;
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

const NO_EDITS: readonly RowEdit[] = [];
const NEW_ROW = '\u0000new';

/** The rows of a revision: looked through, opened, edited; edits gather until they are saved as the next revision. */
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
  const [pending, setPending] = usePendingEdits(props.listKey);
  const [problems, setProblems] = useState<readonly EditProblem[]>([]);
  const [editing, setEditing] = useState<string | null>(null);
  const [said, setSaid] = useState('');
  const plainHref = `${props.listHref}?revision=${revision}`;
  const mayEdit = props.mayEdit && revision === newest;
  const edits = pending?.edits ?? NO_EDITS;
  const columns = useMemo(() => rowColumns(declarations, edits, props.own), [declarations, edits, props.own]);
  const visible = useMemo(
    () => columnsShown(columns, { shown: view.shown, hidden: view.hidden }, isUsual),
    [columns, view.shown, view.hidden],
  );
  const grouping = useMemo(() => groupingColumns(columns), [columns]);
  const typed = useRef(false);
  /** Goes elsewhere, unless that would lose what has been typed. */
  const leaving = (go: () => void) => {
    if (typed.current)
      setSaid('Keep the edit or leave without it first: nothing that is typed is lost unasked.');
    else go();
  };
  const edit = (item: string | null) => {
    typed.current = false;
    setSaid('');
    setEditing(item);
  };
  const close = () => {
    edit(null);
    setView({ ...view, open: null });
  };
  const beside = besideOf(view.open, editing, edits, pages.loaded);

  return (
    <>
      {props.mayEdit && pending !== null ? (
        <PendingPanel
          pending={pending}
          onChange={setPending}
          problems={problems}
          onProblems={setProblems}
          onOpen={(item) =>
            leaving(() => {
              edit(null);
              setView({ ...view, text: item, group: '', open: item });
            })
          }
          to={`${props.listRoute}/edits`}
          newest={newest}
          rows={props.rows}
          listHref={props.listHref}
          onSaved={(saved) => {
            setSaid(`Revision ${saved} is saved.`);
            router.push(`${props.listHref}?revision=${saved}`);
            router.refresh();
          }}
        />
      ) : null}
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
          onAdd={
            mayEdit && edits.length < EDITS_AT_ONCE
              ? () =>
                  leaving(() => {
                    setView({ ...view, open: null });
                    edit(NEW_ROW);
                  })
              : null
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
            onView={(next) => (next.open === view.open ? setView(next) : leaving(() => setView(next)))}
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
          {beside === null ? null : (
            <Inspector onClose={() => leaving(close)}>
              <RowBeside
                key={`${beside.kind} ${editing ?? ''} ${view.open ?? ''}`}
                beside={beside}
                declarations={declarations}
                geometry={props.geometry}
                wholes={props.wholes}
                own={props.own}
                file={props.file}
                mayEdit={mayEdit}
                pending={pending}
                revision={revision}
                problems={problems}
                onPending={setPending}
                onEdit={(on) => edit(on ? view.open : null)}
                onClose={close}
                onTyped={() => {
                  typed.current = true;
                }}
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

/** A new row, a row that is in the table, or an added one that is not yet. */
function besideOf(
  open: string | null,
  editing: string | null,
  edits: readonly RowEdit[],
  loaded: readonly ListRow[],
): Beside | null {
  if (editing === NEW_ROW) return { kind: 'new', edit: null };
  if (open === null) return null;
  const edit = edits.find((one) => itemOfEdit(one) === open);
  if (edit?.kind === 'add') return { kind: 'new', edit };
  const row = loaded.find((one) => rowIdOf(one) === open);
  return row === undefined ? null : { kind: editing === open ? 'edit' : 'look', row };
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
