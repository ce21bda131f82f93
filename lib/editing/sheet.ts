import { DRAFT_ROWS, type DraftEdit } from '@/lib/contracts/list-draft';
import { type Block } from './block';
import { isNumberColumn } from './columns';
import { mixedMarks, pointed } from './decimal-marks';
import { addedKey, changeWith, editedTexts, type Edits, rowKey, type Texts } from './edits';

export interface BaseRow {
  readonly item: string;
  readonly texts: Texts;
}

export type AddedRow = Extract<DraftEdit, { kind: 'add' }>;

/** What a grid shows: rows of the base revision in view, line by line, then the rows that are added. */
export interface Sheet {
  /** Names of the columns shown, from the left. */
  readonly columns: readonly string[];
  readonly rows: number;
  /** Null while the row is on its way from the server. */
  readonly rowAt: (line: number) => BaseRow | null;
  readonly edits: Edits;
  readonly added: readonly AddedRow[];
}

/** A rectangle of cells, its ends included, lines and columns counted from 0. */
export interface Area {
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

export interface Change {
  readonly key: string;
  readonly after: DraftEdit | null;
}

/** What a step of work comes to: changes, and the cells they fell on; or a sentence why not, and then nothing is changed. */
export type Outcome =
  | { readonly done: true; readonly changes: readonly Change[]; readonly area: Area }
  | { readonly done: false; readonly why: string };

/** Gives each row that is added an id of its own. */
export type NewId = () => string;

const refused = (why: string): Outcome => ({ done: false, why });

/** The line after the last, where a new row begins. */
export function endOf(sheet: Pick<Sheet, 'rows' | 'added'>): number {
  return sheet.rows + sheet.added.length;
}

/** The texts of a line as edited; null where it is removed, not here yet, or beyond the end. */
export function textsAt(sheet: Sheet, line: number): Texts | null {
  if (line >= sheet.rows) return sheet.added[line - sheet.rows]?.fields ?? null;
  const row = sheet.rowAt(line);
  return row === null ? null : editedTexts(row.texts, sheet.edits.get(rowKey(row.item)));
}

/** The cells of an area as texts. Null while some row of it is on its way. Removed rows are left out. */
export function blockAt(sheet: Sheet, area: Area): Block | null {
  const names = sheet.columns.slice(area.left, area.right + 1);
  const block: string[][] = [];
  for (let line = area.top; line <= Math.min(area.bottom, endOf(sheet) - 1); line += 1) {
    if (line < sheet.rows && sheet.rowAt(line) === null) return null;
    const texts = textsAt(sheet, line);
    if (texts !== null) block.push(names.map((name) => texts[name] ?? ''));
  }
  return block;
}

export function setCell(sheet: Sheet, line: number, column: number, text: string, newId: NewId): Outcome {
  return write(sheet, { top: line, bottom: line, left: column, right: column }, () => text, newId);
}

export function clearCells(sheet: Sheet, area: Area, newId: NewId): Outcome {
  const bottom = Math.min(area.bottom, endOf(sheet) - 1);
  return write(sheet, { ...area, bottom }, () => '', newId);
}

/** Repeats the first line of an area in the lines below it; of a single line, the line above in it. */
export function fillDown(sheet: Sheet, area: Area, newId: NewId): Outcome {
  const from = area.top === area.bottom ? area.top - 1 : area.top;
  const to = { ...area, top: from + 1, bottom: Math.min(area.bottom, endOf(sheet) - 1) };
  if (from < 0 || to.top > to.bottom) return refused('There is no line above to fill down from.');
  if (sheet.columns.slice(area.left, area.right + 1).includes('item'))
    return refused('Every row has an item of its own. Fill down the other columns.');
  const texts = textsAt(sheet, from);
  if (texts === null) return refused('The line to fill down from is removed, or not loaded yet.');
  return write(sheet, to, (_, column) => texts[sheet.columns[column] ?? ''] ?? '', newId);
}

/**
 * Puts a block of cells into an area: repeated where it fits the area a whole number of times, from the area's first cell otherwise.
 * Lines beyond the end become new rows.
 */
export function pasteBlock(sheet: Sheet, area: Area, block: Block, newId: NewId): Outcome {
  const [height, width] = [block.length, block[0]?.length ?? 0];
  if (height === 0 || width === 0) return refused('There is nothing to paste.');
  const [lines, across] = [area.bottom - area.top + 1, area.right - area.left + 1];
  const fits = lines % height === 0 && across % width === 0;
  const to = fits ? area : { ...area, bottom: area.top + height - 1, right: area.left + width - 1 };
  if (to.right >= sheet.columns.length) {
    const room = sheet.columns.length - area.left;
    return refused(
      `The block has ${width} columns, and only ${room} of the grid are from here to its right end. Nothing was pasted.`,
    );
  }
  const numbers = block.flatMap((row) =>
    row.filter((_, at) => isNumberColumn(sheet.columns[area.left + at] ?? '')),
  );
  const mixed = mixedMarks(numbers);
  if (mixed !== null)
    return refused(
      `The block has a decimal comma (\`${mixed.comma}\`), so \`${mixed.doubtful}\` may have a thousands separator. Nothing was ` +
        'pasted. Use one decimal mark in the whole block.',
    );
  return write(
    sheet,
    to,
    (line, column) => block[(line - to.top) % height]?.[(column - to.left) % width] ?? '',
    newId,
  );
}

/** Takes the rows of an area away: added ones at once, the others when the draft is saved. */
export function removeRows(sheet: Sheet, area: Area): Outcome {
  return eachRow(sheet, area, (item, edit) => (edit?.kind === 'remove' ? edit : { kind: 'remove', item }));
}

/** Puts rows back to what the base revision says; added ones go. */
export function restoreRows(sheet: Sheet, area: Area): Outcome {
  return eachRow(sheet, area, () => null);
}

export function addRow(sheet: Sheet, newId: NewId): Outcome {
  if (sheet.edits.size >= DRAFT_ROWS) return refused(TOO_MANY);
  const edit: DraftEdit = { kind: 'add', id: newId(), place: nextPlace(sheet), fields: {} };
  const line = endOf(sheet);
  const change = { key: addedKey(edit.id), after: edit };
  return { done: true, changes: [change], area: { top: line, bottom: line, left: 0, right: 0 } };
}

/** A row as a form leaves it: every field that it holds. */
export function setRow(sheet: Sheet, line: number, fields: Texts): Outcome {
  const at = { top: line, bottom: line, left: 0, right: 0 };
  const clean = Object.fromEntries(Object.entries(fields).map(([name, text]) => [name, asKept(name, text)]));
  if (line >= sheet.rows) {
    const added = sheet.added[line - sheet.rows];
    if (added === undefined) return refused('There is no such row.');
    const change = {
      key: addedKey(added.id),
      after: { ...added, fields: filled({ ...added.fields, ...clean }) },
    };
    return { done: true, changes: [change], area: at };
  }
  const row = sheet.rowAt(line);
  if (row === null) return refused(NOT_HERE);
  const key = rowKey(row.item);
  const change = { key, after: changeWith(row.item, row.texts, sheet.edits.get(key), clean) };
  return { done: true, changes: [change], area: at };
}

const TOO_MANY = `At most ${DRAFT_ROWS} rows can be edited in one draft. Save this one first, or upload a file.`;
const NOT_HERE = 'Some of these rows are not loaded yet. Scroll through them first.';

function nextPlace({ added }: Sheet): number {
  return (added.at(-1)?.place ?? 0) + 1;
}

const filled = (fields: Texts): Record<string, string> =>
  Object.fromEntries(Object.entries(fields).filter(([, text]) => text !== ''));

const asKept = (column: string, text: string): string =>
  isNumberColumn(column) ? pointed(text) : text.trim();

function write(
  sheet: Sheet,
  area: Area,
  textAt: (line: number, column: number) => string,
  newId: NewId,
): Outcome {
  const changes: Change[] = [];
  let place = nextPlace(sheet);
  for (let line = area.top; line <= area.bottom; line += 1) {
    const fields: Record<string, string> = {};
    for (let column = area.left; column <= area.right; column += 1) {
      const name = sheet.columns[column] ?? '';
      fields[name] = asKept(name, textAt(line, column));
    }
    if (line < sheet.rows) {
      const row = sheet.rowAt(line);
      if (row === null) return refused(NOT_HERE);
      const key = rowKey(row.item);
      const edit = sheet.edits.get(key);
      if (edit?.kind === 'remove')
        return refused(`The row \`${row.item}\` is removed. Put it back before you write in it.`);
      changes.push({ key, after: changeWith(row.item, row.texts, edit, fields) });
      continue;
    }
    const known = sheet.added[line - sheet.rows];
    const added: AddedRow = known ?? { kind: 'add', id: newId(), place: place++, fields: {} };
    changes.push({
      key: addedKey(added.id),
      after: { ...added, fields: filled({ ...added.fields, ...fields }) },
    });
  }
  return within(sheet, changes, area);
}

function eachRow(
  sheet: Sheet,
  area: Area,
  after: (item: string, edit: DraftEdit | undefined) => DraftEdit | null,
): Outcome {
  const changes: Change[] = [];
  for (let line = area.top; line <= Math.min(area.bottom, endOf(sheet) - 1); line += 1) {
    if (line >= sheet.rows) {
      const added = sheet.added[line - sheet.rows];
      if (added !== undefined) changes.push({ key: addedKey(added.id), after: null });
      continue;
    }
    const row = sheet.rowAt(line);
    if (row === null) return refused(NOT_HERE);
    const key = rowKey(row.item);
    changes.push({ key, after: after(row.item, sheet.edits.get(key)) });
  }
  return within(sheet, changes, area);
}

function within(sheet: Sheet, changes: readonly Change[], area: Area): Outcome {
  const fresh = changes.filter(({ key, after }) => after !== null && !sheet.edits.has(key)).length;
  if (fresh > 0 && sheet.edits.size + fresh > DRAFT_ROWS) return refused(TOO_MANY);
  return { done: true, changes, area };
}
