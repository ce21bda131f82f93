'use client';

import { useRouter } from 'next/navigation';
import {
  useCallback,
  useDeferredValue,
  useEffect,
  useMemo,
  useRef,
  useState,
  useSyncExternalStore,
} from 'react';
import { Inspector } from '@/components/data-table/inspector';
import { at, bounds, type Selection } from '@/components/data-table/selection';
import { useUrlView } from '@/components/data-table/use-url-view';
import { ask, AskFailed } from '@/components/lists/ask';
import { BaseRows, KnownRows } from '@/components/lists/editing/base-rows';
import { ClashPanel } from '@/components/lists/editing/clash-panel';
import { DraftStore, json } from '@/components/lists/editing/draft-store';
import { EditBar } from '@/components/lists/editing/edit-bar';
import { EditGrid, type Goal } from '@/components/lists/editing/edit-grid';
import { EffectTable } from '@/components/lists/editing/effect-table';
import { gridColumns, unusedColumns } from '@/components/lists/editing/grid-columns';
import { Journal } from '@/components/lists/editing/journal';
import { OthersAtWork } from '@/components/lists/editing/others-at-work';
import { byKey, placesOf, type ProblemPlace } from '@/components/lists/editing/problem-places';
import { SaveForm } from '@/components/lists/editing/save-form';
import { ThrowAway } from '@/components/lists/editing/throw-away';
import { usePresence } from '@/components/lists/editing/use-presence';
import { useUnsavedGuard } from '@/components/lists/editing/use-unsaved-guard';
import { counted, PRODUCT_WORDS } from '@/components/lists/list-words';
import { Quoted } from '@/components/lists/quoted';
import { RowForm } from '@/components/lists/row-form';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import {
  type Choice,
  type Clashes,
  type Draft,
  movedDraftSchema,
  type Presence,
  savedDraftSchema,
} from '@/lib/contracts/list-draft';
import { type EditProblem } from '@/lib/contracts/list-edits';
import { type RowPage } from '@/lib/contracts/list-rows';
import { readBlock, writeBlock } from '@/lib/editing/block';
import { addedKey, addedRows, rowKey, type Texts, textsOfRow } from '@/lib/editing/edits';
import { effectFigures } from '@/lib/editing/effect-figures';
import { Ledger, problemsByKey } from '@/lib/editing/ledger';
import { RowReader } from '@/lib/editing/read-row';
import {
  addRow,
  type Area,
  blockAt,
  clearCells,
  endOf,
  fillDown,
  type Outcome,
  pasteBlock,
  removeRows,
  restoreRows,
  setCell,
  setRow,
  type Sheet,
  textsAt,
} from '@/lib/editing/sheet';
import { fromNumbers } from '@/lib/mass/account';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';

export interface EditStationProps {
  /** Id of the person whose draft it is. */
  readonly person: string;
  /** The row to begin with, and its place in the list from 0. */
  readonly open: { readonly item: string; readonly place: number } | null;
  readonly listHref: string;
  /** The internal route of the list. */
  readonly route: string;
  /** The revision that the draft is made from, or the newest where there is no draft. */
  readonly base: number;
  readonly draft: Draft | null;
  readonly presence: Presence;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  /** Basic account of the base revision about the geometry's r0, with what rounding left out. */
  readonly whole: readonly number[];
  /** The first page of its rows. */
  readonly first: RowPage;
  readonly groups: readonly string[];
  /** Columns of the list's own. */
  readonly own: readonly string[];
}

const newId = (): string => crypto.randomUUID();
const FROM_START = at(0, 0);

/** Only asked for in the browser. */
const browserStorage = {
  getItem: (key: string) => window.localStorage.getItem(key),
  setItem: (key: string, text: string) => window.localStorage.setItem(key, text),
  removeItem: (key: string) => window.localStorage.removeItem(key),
};

/** The page on which a list is edited: the grid, what the edits do to the sums, problems, drafts, saving. */
export function EditStation(props: EditStationProps) {
  const { route, listHref, base, declarations, geometry, first } = props;
  const router = useRouter();
  const [store] = useState(
    () =>
      new DraftStore(
        `${route}/draft`,
        base,
        props.draft,
        new Journal(browserStorage, `polhode-unsent:${route}:${props.person}`, base),
      ),
  );
  const [known] = useState(() => new KnownRows(props.draft));
  useUnsavedGuard(store);
  const { history, keeping, leftBehind } = useSyncExternalStore(store.subscribe, store.get, store.get);
  const { edits } = history;
  const presence = usePresence(route, props.presence);

  const [urlView, setUrlView] = useUrlView();
  const allColumns = useMemo(() => gridColumns(declarations, props.own), [declarations, props.own]);
  const [hidden, setHidden] = useState(() => unusedColumns(allColumns, first.rows.map(textsOfRow)));
  const view = { ...urlView, hidden };
  const query = useMemo(() => {
    const asked = new URLSearchParams();
    if (urlView.text !== '') asked.set('find', urlView.text);
    if (urlView.group !== '') asked.set('group', urlView.group);
    return asked.toString();
  }, [urlView.text, urlView.group]);
  const rows = useMemo(
    () => new BaseRows(`${route}/revisions/${base}`, query, known, query === '' ? first : null),
    [route, base, query, known, first],
  );
  useSyncExternalStore(
    rows.subscribe,
    () => rows.age,
    () => 0,
  );

  const columns = useMemo(
    () => allColumns.filter(({ id }, index) => index === 0 || !hidden.includes(id)),
    [allColumns, hidden],
  );
  const names = useMemo(() => columns.map(({ id }) => id), [columns]);
  const added = useMemo(() => addedRows(edits), [edits]);
  const sheet: Sheet = { columns: names, rows: rows.total ?? 0, rowAt: rows.rowAt, edits, added };

  const ledger = useMemo(() => new Ledger(declarations, geometry), [declarations, geometry]);
  const reader = useMemo(() => new RowReader(declarations), [declarations]);
  const whole = useMemo(() => fromNumbers(props.whole), [props.whole]);
  const later = useDeferredValue(edits);
  const effect = useMemo(() => ledger.effect(whole, later, known.textsOf), [ledger, whole, later, known]);
  const figures = useMemo(
    () => ({
      before: effectFigures(whole, declarations, geometry),
      after: effectFigures(effect.account, declarations, geometry),
    }),
    [whole, effect, declarations, geometry],
  );

  const [refusedBySave, setRefusedBySave] = useState<{
    readonly edits: typeof edits;
    readonly problems: readonly EditProblem[];
  } | null>(null);
  const saveProblems = refusedBySave?.edits === edits ? refusedBySave.problems : NO_PROBLEMS;
  const problems = useMemo(
    () => problemsByKey(ledger, edits, known.textsOf, byKey([...keeping.problems, ...saveProblems], edits)),
    [ledger, edits, known, keeping.problems, saveProblems],
  );
  const problemCount = useMemo(
    () => [...problems.values()].reduce((sum, each) => sum + each.length, 0),
    [problems],
  );

  const [selection, setSelection] = useState<Selection>(
    props.open === null ? FROM_START : at(props.open.place, 0),
  );
  const [goal, setGoal] = useState<Goal | null>(
    props.open === null ? null : { line: props.open.place, column: 0 },
  );
  const [said, setSaid] = useState<{ readonly words: string; readonly isRefusal: boolean } | null>(null);
  const [busy, setBusy] = useState(false);
  const [clashes, setClashes] = useState<Clashes | null>(null);
  const [form, setForm] = useState(props.open !== null);
  useEffect(() => store.takeUnsent(), [store]);
  const lastProblem = useRef<ProblemPlace | null>(null);

  const present = (): Sheet => {
    const now = store.get().history.edits;
    return { ...sheet, rows: rows.total ?? 0, edits: now, added: addedRows(now) };
  };
  const take = (outcome: Outcome): boolean => {
    if (!outcome.done) {
      setSaid({ words: outcome.why, isRefusal: true });
      return false;
    }
    setSaid(null);
    store.step(outcome.changes);
    return true;
  };
  /** A step on lines that may not be here yet: they are loaded first. */
  const onArea = async (area: Area, step: (sheet: Sheet) => Outcome): Promise<void> => {
    await rows.load(area.top, area.bottom);
    take(step(present()));
  };
  const report = (error: unknown) => {
    if (!(error instanceof AskFailed)) throw error;
    setSaid({ words: error.message, isRefusal: true });
  };

  const lead = (line: number, column: number) => {
    setSelection(at(line, column));
    setGoal({ line, column });
  };
  const goTo = (key: string, column: string | null) => {
    const edit = edits.get(key);
    if (edit === undefined) return;
    if (column !== null && hidden.includes(column)) setHidden(hidden.filter((each) => each !== column));
    const index = Math.max(
      0,
      allColumns
        .filter(({ id }, place) => place === 0 || !hidden.includes(id) || id === column)
        .findIndex(({ id }) => id === column),
    );
    const line =
      edit.kind === 'add'
        ? sheet.rows + added.indexOf(edit)
        : (rows.lineOf(edit.item) ?? (query === '' ? (known.places.get(edit.item) ?? null) : null));
    if (line !== null) {
      lead(line, index);
      return;
    }
    const item = edit.kind === 'add' ? '' : edit.item;
    setUrlView({ ...urlView, group: '', text: known.places.has(item) ? '' : item });
    setSaid({
      words: `The row \`${item}\` was not in view. All rows are shown again; go to the problem once more.`,
      isRefusal: false,
    });
    lastProblem.current = null;
  };
  const nextProblem = () => {
    const places = placesOf(problems, edits, (item) => known.places.get(item));
    const last = lastProblem.current;
    const before = places.findIndex(({ key, column }) => key === last?.key && column === last.column);
    const next = places[(before + 1) % places.length];
    if (next === undefined) return;
    lastProblem.current = next;
    goTo(next.key, next.column);
  };

  const save = async (reason: string) => {
    if (problemCount > 0) {
      setSaid({
        words: `${counted(problemCount, 'problem')} to mend before this can be a revision.`,
        isRefusal: true,
      });
      nextProblem();
      return;
    }
    setBusy(true);
    setSaid(null);
    try {
      if (!(await store.flush())) {
        setSaid({ words: 'Not saved: the last edits did not reach the server.', isRefusal: true });
        return;
      }
      const { version } = store.get().keeping;
      const saved = await ask(`${route}/draft/save`, savedDraftSchema, json('POST', { version, reason }));
      if (saved.status === 'clashes') setClashes(saved);
      else if (saved.status === 'problems') setRefusedBySave({ edits, problems: saved.problems });
      else {
        router.push(`${listHref}?revision=${saved.revision}`);
        router.refresh();
      }
    } catch (error) {
      report(error);
    } finally {
      setBusy(false);
    }
  };
  const move = async (onto: number, choices: readonly Choice[]) => {
    setBusy(true);
    setSaid(null);
    try {
      const kept = await store.flush();
      const { version } = store.get().keeping;
      if (!kept) setSaid({ words: 'The last edits did not reach the server. Try again.', isRefusal: true });
      else if (version === 0) router.refresh();
      else {
        const moved = await ask(
          `${route}/draft/move`,
          movedDraftSchema,
          json('POST', { version, onto, choices }),
        );
        if (moved.status === 'clashes') setClashes(moved);
        else {
          setClashes(null);
          router.refresh();
        }
      }
    } catch (error) {
      report(error);
    } finally {
      setBusy(false);
    }
  };

  const { line: activeLine, column: activeColumn } = selection.head;
  const activeKey = keyAt(sheet, activeLine);
  const activeProblems = activeKey === null ? [] : (problems.get(activeKey) ?? []);
  const here = activeProblems.filter(({ column }) => column === names[activeColumn] || column === null);
  const formTexts = form ? textsAt(sheet, activeLine) : null;
  const onWindow = useCallback(
    (first: number, last: number) => void rows.load(first, Math.max(first, last - 1)),
    [rows],
  );
  const check = useCallback(
    (texts: Texts, column: string) =>
      reader.read(texts).problems.find((problem) => problem.column === column)?.message ?? null,
    [reader],
  );
  const area = bounds(selection);
  const closeForm = () => {
    setForm(false);
    setGoal({ line: activeLine, column: activeColumn });
  };
  const movedOn = presence.newest.number > base;

  return (
    <>
      <OthersAtWork others={presence.others} />
      {movedOn && clashes === null ? (
        <Banner
          severity="warning"
          word="Moved on"
          live
          title={`${presence.newest.author} made revision ${presence.newest.number} after you began from revision ${base}`}
          action={
            <Button disabled={busy} onClick={() => void move(presence.newest.number, [])}>
              {`Go on from revision ${presence.newest.number}`}
            </Button>
          }
        >
          <p>
            <TextLink href={`${listHref}/changes?from=${base}&to=${presence.newest.number}`}>
              See what changed
            </TextLink>
            . Your edits are kept: they are merged row by row, now or when you save, and what both changed is
            shown to you.
          </p>
        </Banner>
      ) : null}
      {keeping.state === 'elsewhere' ? (
        <Banner
          severity="warning"
          word="Not kept"
          live
          title="This draft was changed in another window"
          action={<Button onClick={() => void store.takeOther().catch(report)}>Bring both together</Button>}
        >
          <p>
            Nothing was overwritten. What only one window changed is taken; where both changed a field, the
            other window keeps it and yours is named here.
          </p>
        </Banner>
      ) : null}
      {leftBehind.length === 0 ? null : (
        <Banner
          severity="warning"
          word="Left out"
          live
          title="Both windows changed these, and the other window has them"
          action={<Button onClick={() => store.forgetLeftBehind()}>Close this note</Button>}
        >
          <ul>
            {leftBehind.map(({ key, column, text }) => (
              <li key={`${key} ${column ?? ''}`}>
                <code>{key.replace(/^row /, '')}</code>
                {column === null ? '' : `, ${column}`}, yours: <code>{text || 'blank'}</code>
              </li>
            ))}
          </ul>
        </Banner>
      )}
      {clashes === null ? null : (
        <ClashPanel
          key={`${clashes.onto} ${clashes.clashes.length}`}
          clashes={clashes}
          base={base}
          busy={busy}
          onChoose={(choices) => void move(clashes.onto, choices)}
        />
      )}
      <Section title="Rows">
        <EditBar
          columns={allColumns}
          view={view}
          onView={(next) => {
            setHidden(next.hidden);
            if (next.text !== view.text || next.group !== view.group)
              setUrlView({ ...urlView, text: next.text, group: next.group });
          }}
          groups={props.groups}
          rows={rows.total === null ? 'Loading rows' : counted(rows.total, 'row')}
          edited={edits.size}
          problems={problemCount}
          keeping={keeping}
          canUndo={history.past.length > 0}
          canRedo={history.future.length > 0}
          onUndo={() => store.undo()}
          onRedo={() => store.redo()}
          onAdd={() => {
            const line = endOf(sheet);
            if (take(addRow(present(), newId))) lead(line, 0);
          }}
          onRemove={() => void onArea(area, (now) => removeRows(now, area))}
          onRestore={() => void onArea(area, (now) => restoreRows(now, area))}
          onForm={() => setForm(true)}
          onNextProblem={nextProblem}
        />
        {rows.failure === null ? null : (
          <Banner
            severity="blocker"
            word="Failed"
            live
            title="Some rows could not be loaded"
            action={<Button onClick={() => void rows.load(activeLine, activeLine)}>Try again</Button>}
          >
            <p>{rows.failure.message}</p>
          </Banner>
        )}
        <div
          className={form ? 'grid min-w-0 gap-4 lg:grid-cols-[minmax(0,1fr)_384px]' : 'grid min-w-0'}
          inert={busy || rows.total === null}
        >
          <EditGrid
            caption={`Rows of revision ${base} as edited`}
            columns={columns}
            sheet={sheet}
            problems={problems}
            check={check}
            onWindow={onWindow}
            selection={selection}
            onSelect={setSelection}
            goal={goal}
            onSet={(line, column, text) => take(setCell(present(), line, column, text, newId))}
            onClear={(at) => void onArea(at, (now) => clearCells(now, at, newId))}
            onFill={(at) => void onArea({ ...at, top: at.top - 1 }, (now) => fillDown(now, at, newId))}
            onCopy={(at) => {
              const block = blockAt(sheet, at);
              if (block === null)
                setSaid({
                  words: 'Some of these rows are not loaded yet. Scroll through them first.',
                  isRefusal: true,
                });
              return block === null ? null : writeBlock(block);
            }}
            onPaste={(at, text) => {
              const block = readBlock(text);
              const bottom = Math.max(at.bottom, at.top + block.length - 1);
              void onArea({ ...at, bottom }, (now) => pasteBlock(now, at, block, newId));
            }}
            onUndo={() => store.undo()}
            onRedo={() => store.redo()}
          />
          {formTexts === null ? null : (
            <Inspector onClose={closeForm}>
              <RowForm
                key={activeKey ?? activeLine}
                declarations={declarations}
                texts={formTexts}
                own={props.own}
                isNew={activeLine >= sheet.rows}
                problems={activeProblems.map(({ column, message }) => ({
                  item: null,
                  column,
                  found: null,
                  message,
                }))}
                onDone={(fields) => {
                  if (take(setRow(present(), activeLine, fields))) closeForm();
                }}
                onLeave={closeForm}
                onTyped={() => undefined}
              />
            </Inspector>
          )}
        </div>
        <p
          role="status"
          className={
            said?.isRefusal === true || here.length > 0 ? 'min-h-5 text-limit' : 'min-h-5 text-ink-2'
          }
        >
          {said !== null ? (
            <Quoted text={said.words} />
          ) : (
            here.map(({ column, message }) => (
              <span key={`${column ?? ''} ${message}`} className="block">
                {column === null ? '' : `${column}: `}
                <Quoted text={message} />
              </span>
            ))
          )}
        </p>
        <p className="measure text-note text-ink-2">
          Products in the grid are as the list states them: {PRODUCT_WORDS[declarations.products]}. Enter or
          F2 edits a cell, the last line begins a new row, a block from a spreadsheet can be pasted. The key{' '}
          <kbd>?</kbd> lists all keys.
        </p>
      </Section>
      <Section
        title="What the edits do"
        aside={
          effect.leftOut === 0 ? undefined : `${counted(effect.leftOut, 'edited row')} with problems left out`
        }
      >
        <div className="grid items-start gap-8 lg:grid-cols-[3fr_2fr]">
          <EffectTable {...figures} base={base} declarations={declarations} />
          <SaveForm
            next={presence.newest.number + 1}
            rows={edits.size}
            busy={busy}
            onSave={(reason) => void save(reason)}
          >
            {keeping.version === 0 ? null : (
              <ThrowAway
                route={`${route}/draft`}
                rows={edits.size}
                version={async () => ((await store.flush()) ? store.get().keeping.version : null)}
                onGone={() => {
                  router.push(listHref);
                  router.refresh();
                }}
              />
            )}
          </SaveForm>
        </div>
      </Section>
    </>
  );
}

const NO_PROBLEMS: readonly EditProblem[] = [];

function keyAt(sheet: Sheet, line: number): string | null {
  if (line >= sheet.rows) {
    const added = sheet.added[line - sheet.rows];
    return added === undefined ? null : addedKey(added.id);
  }
  const row = sheet.rowAt(line);
  return row === null ? null : rowKey(row.item);
}
