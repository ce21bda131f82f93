import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { cellText, type FileSample, type GridRow } from './grid';
import { findHeader, headingsOf, type HeaderPlace } from './find-header';
import { readHeading, type Heading } from './heading';
import { type ColumnUse, dimensionOfColumn, type Draft, isNumberColumn, positionOf } from './mapping';
import { judgeStyle, PLAIN_NUMBERS, readStyled, type StyleEvidence } from './number-style';
import { RowKinds } from './row-kind';
import { UNITS_OF, dimensionOf } from './unit-words';
import { columnNamed, isMoment } from './words';

/** What a column seems to be, and why. `sure` guesses stand in the draft, the others are put as a question. */
export interface ColumnGuess {
  readonly to: ColumnUse;
  readonly sure: boolean;
  readonly because: string;
}

export interface Guesses {
  readonly draft: Draft;
  readonly header: { readonly because: string } | null;
  readonly columns: readonly ColumnGuess[];
  readonly numbers: StyleEvidence;
}

type Units = Pick<ListDeclarations, 'massUnit' | 'lengthUnit' | 'inertiaUnit' | 'kind'>;

/** The first draft of a mapping from the first and last rows of a file: nothing in it is settled until a person confirms it. */
export function guessMapping(
  sample: FileSample,
  declared: Units,
  header: Pick<HeaderPlace, 'first' | 'last'> | null = null,
): Guesses {
  const found = header === null ? findHeader(sample.head) : { ...header, because: 'You chose it.' };
  if (found === null) {
    const numbers: StyleEvidence = { style: PLAIN_NUMBERS, because: 'No columns are known yet.' };
    return { draft: emptyDraft(sample), header: null, columns: [], numbers };
  }
  const headings = headingsOf(sample.head, found);
  const rows = dataRows(sample, found);
  const guesses = guessColumns(headings, rows, declared);
  const columns = headings.map((heading, index) => ({
    heading,
    to: guesses[index]?.sure === true ? guesses[index].to : null,
  }));
  const numbers = judgeNumbers(guesses, rows, sample);
  const kinds = new RowKinds({
    columns: headings.map((heading, index) => ({ heading, to: guesses[index]?.to ?? null })),
  });
  const met = new Set(rows.map((row) => kinds.kindOf(row)));
  const draft: Draft = {
    delimiter: sample.delimiter,
    sheet: sample.sheet,
    header: { first: found.first, last: found.last },
    columns,
    numbers: numbers.style,
    per: guessPer(headings, guesses, rows),
    leaveOut: {
      totals: met.has('total') ? null : true,
      texts: met.has('text') ? null : false,
      headings: met.has('heading') ? null : false,
    },
  };
  return { draft, header: { because: found.because }, columns: guesses, numbers };
}

/** The rows of a sample that come after its header. */
export function dataRows(
  sample: Pick<FileSample, 'head' | 'tail'>,
  header: Pick<HeaderPlace, 'last'>,
): GridRow[] {
  return [...sample.head, ...sample.tail].filter(({ line }) => line > header.last);
}

function emptyDraft({ delimiter, sheet }: FileSample): Draft {
  const undecided = { totals: null, texts: null, headings: null };
  return { delimiter, sheet, header: null, columns: [], numbers: null, per: null, leaveOut: undecided };
}

function guessColumns(headings: readonly string[], rows: readonly GridRow[], declared: Units): ColumnGuess[] {
  const read = headings.map(readHeading);
  const guesses = read.map((heading, index) =>
    guessByName(heading, headings[index] ?? '', rows, index, declared),
  );
  settleDoubles(guesses, read, declared);
  guessByValues(guesses, headings, rows);
  return guesses;
}

function guessByName(
  heading: Heading,
  text: string,
  rows: readonly GridRow[],
  index: number,
  declared: Units,
): ColumnGuess {
  const values = rows.map((row) => cellText(row.cells[index])).filter((value) => value !== '');
  if (text === '') {
    return values.length === 0
      ? { to: { use: 'ignored' }, sure: true, because: 'It has no heading and no values.' }
      : { to: { use: 'extra' }, sure: false, because: 'It has no heading.' };
  }
  const match = columnNamed(heading.name);
  const dimension = heading.unit === null ? null : dimensionOf(heading.unit);
  if (match === null || (match.column === 'change_ref' && declared.kind === 'components')) {
    if (isMoment(heading.name))
      return {
        to: { use: 'extra' },
        sure: true,
        because: 'A first moment: it is computed from mass and place.',
      };
    const because =
      heading.unit === null
        ? 'The contract has no such column; it is kept with the row.'
        : `In ${heading.unit}; the contract has no such column, so it is kept with the row.`;
    return { to: { use: 'extra' }, sure: true, because };
  }
  const wanted = dimensionOfColumn(match.column);
  const named =
    match.weight === 1
      ? `The heading says ${heading.name}.`
      : `The heading says ${heading.name}, which may be ${match.column}.`;
  if (dimension !== null && dimension !== wanted) {
    return {
      to: { use: 'extra' },
      sure: false,
      because: `${named} But ${heading.unit ?? ''} is no unit of ${match.column}.`,
    };
  }
  const unit =
    wanted === null
      ? null
      : (heading.unit ?? (wanted === 'angle' ? 'deg' : wanted === 'share' ? shareUnit(values) : null));
  const to: ColumnUse = { use: 'column', column: match.column, unit };
  if (wanted !== null && heading.unknownUnit !== null) {
    return {
      to,
      sure: false,
      because: `${named} Its unit \`${heading.unknownUnit}\` is none that is known here (${UNITS_OF[wanted].join(', ')}).`,
    };
  }
  if (wanted === 'share' && unit === null)
    return {
      to: { ...to, unit: 'percent' },
      sure: false,
      because: `${named} Its values may be percent or fractions.`,
    };
  const because = unit === null || heading.unit === null ? named : `${named.slice(0, -1)}, in ${unit}.`;
  return { to, sure: match.weight === 1 || match.allPieces, because };
}

/** Values of which none is above 1 may be fractions; a percent sign settles it. */
function shareUnit(values: readonly string[]): 'percent' | null {
  if (values.some((value) => value.endsWith('%'))) return 'percent';
  const numbers = values.map((value) => Number(value.replace(',', '.')));
  return numbers.some((value) => value > 1) || numbers.every((value) => value === 0) ? 'percent' : null;
}

/** A contract column is taken once: by the surest name, then by the list's own unit, then by the first. */
function settleDoubles(guesses: ColumnGuess[], headings: readonly Heading[], declared: Units): void {
  const taken = new Map<ListColumn, number>();
  const rank = (index: number): number => {
    const guess = guesses[index];
    const heading = headings[index];
    if (guess?.to.use !== 'column' || heading === undefined) return 0;
    const match = columnNamed(heading.name);
    const own =
      heading.unit === declared.massUnit ||
      heading.unit === declared.lengthUnit ||
      heading.unit === declared.inertiaUnit;
    return (guess.sure ? 4 : 0) + (match?.weight ?? 0) + (own ? 0.5 : 0);
  };
  for (const [index, { to }] of guesses.entries()) {
    if (to.use !== 'column') continue;
    const other = taken.get(to.column);
    if (other === undefined) {
      taken.set(to.column, index);
      continue;
    }
    const [winner, loser] = rank(index) > rank(other) ? [index, other] : [other, index];
    taken.set(to.column, winner);
    guesses[loser] = {
      to: { use: 'extra' },
      sure: true,
      because: `It would be ${to.column} too, which column ${winner + 1} is already; kept with the row.`,
    };
  }
}

/** What headings leave open, values may tell: a column of different values as the key, one of E, C and A as maturity. */
function guessByValues(guesses: ColumnGuess[], headings: readonly string[], rows: readonly GridRow[]): void {
  const has = (column: ListColumn): boolean =>
    guesses.some(({ to }) => to.use === 'column' && to.column === column);
  const open = guesses.flatMap(({ to }, index) =>
    to.use === 'extra' && headings[index] !== '' ? [index] : [],
  );
  for (const index of open) {
    const values = rows.map((row) => cellText(row.cells[index])).filter((value) => value !== '');
    if (values.length < 3) continue;
    if (!has('maturity') && values.every((value) => /^[ECA]$/iu.test(value)) && new Set(values).size > 1) {
      guesses[index] = {
        to: { use: 'column', column: 'maturity', unit: null },
        sure: false,
        because: 'All its values are E, C or A.',
      };
    } else if (
      !has('item') &&
      !has('part_number') &&
      new Set(values).size === values.length &&
      values.length >= rows.length * 0.8 &&
      values.every((value) => !/^[+-]?\d*[.,]\d+$/u.test(value))
    ) {
      guesses[index] = {
        to: { use: 'column', column: 'item', unit: null },
        sure: false,
        because: 'Every value in the rows seen is different, so it could be the key.',
      };
    }
  }
}

function judgeNumbers(
  guesses: readonly ColumnGuess[],
  rows: readonly GridRow[],
  { delimiter, sheet }: FileSample,
): StyleEvidence {
  const texts = guesses.flatMap(({ to }, index) => {
    if (to.use !== 'column' || !isNumberColumn(to.column)) return [];
    return rows.map((row) => row.cells[index]).filter((cell) => typeof cell === 'string');
  });
  return judgeStyle(texts, sheet === null && delimiter !== ',');
}

/** One piece or all: it matters only where a row has more than one. */
function guessPer(
  headings: readonly string[],
  guesses: readonly ColumnGuess[],
  rows: readonly GridRow[],
): Draft['per'] {
  const columns = guesses.map((guess, index) => ({ heading: headings[index] ?? '', to: guess.to }));
  const [quantity, mass] = [positionOf(columns, 'quantity'), positionOf(columns, 'mass')];
  const several = rows.some((row) => {
    const value = readStyled(cellText(row.cells[quantity]), PLAIN_NUMBERS);
    return typeof value === 'number' && value > 1;
  });
  if (quantity === -1 || mass === -1 || !several) return 'piece';
  const name = readHeading(headings[mass] ?? '').name;
  if (columnNamed(name)?.allPieces === true) return 'row';
  return /\b(?:unit|each|per|piece)\b/u.test(name) ? 'piece' : null;
}
