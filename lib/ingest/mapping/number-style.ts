import { type NumberFault, readNumber } from '@/lib/ingest/table/number-text';
import { shorten } from '@/lib/ingest/problem-log';

/** How a file writes its numbers. `thousands` may be left out by a number, but stands rightly where it stands. */
export interface NumberStyle {
  readonly decimal: '.' | ',';
  readonly thousands: '' | ',' | '.' | ' ' | "'";
}

export const PLAIN_NUMBERS: NumberStyle = { decimal: '.', thousands: '' };

/** The style in an example. */
export function styleExample({ decimal, thousands }: NumberStyle): string {
  return `12${thousands}345${decimal}6`;
}

const BLANKS = /[\u00A0\u202F\u2009]/gu;
const QUOTES = /[’‘]/gu;
const evened = (text: string): string => text.replace(BLANKS, ' ').replace(QUOTES, "'");

/** A finite number from a trimmed text written in a style, or why it is none. Nothing is read by another style than the chosen. */
export function readStyled(text: string, style: NumberStyle): number | NumberFault {
  const plain = plainText(evened(text), style);
  if (plain !== null) return readNumber(plain, false);
  const other = readNumber(text, style.decimal === ',');
  if (typeof other !== 'number') return other;
  return {
    kind: 'number-style',
    message: `\`${shorten(text)}\` is not written as the mapping says numbers are (${styleExample(style)}). Put the file right, or change the mapping.`,
  };
}

/** The number with a decimal point and no thousands separators; null where the text is not in the style. */
function plainText(text: string, { decimal, thousands }: NumberStyle): string | null {
  const match = /^([+-]?)([\d.,' ]*?)((?:[eE][+-]?\d+)?)$/u.exec(text);
  if (match === null) return null;
  const [, sign = '', digits = '', exponent = ''] = match;
  const [whole = '', fraction = '', ...more] = digits.split(decimal);
  if (more.length > 0 || /\D/u.test(fraction) || (whole === '' && fraction === '')) return null;
  const bare = thousands === '' ? whole : whole.replaceAll(thousands, '');
  if (/\D/u.test(bare)) return null;
  if (bare !== whole && !isGrouped(whole, thousands)) return null;
  return `${sign}${bare === '' ? '0' : bare}${fraction === '' ? '' : `.${fraction}`}${exponent}`;
}

function isGrouped(whole: string, thousands: string): boolean {
  const [first = '', ...rest] = whole.split(thousands);
  return /^\d{1,3}$/u.test(first) && rest.every((group) => /^\d{3}$/u.test(group));
}

/** What a file's numbers say of their style: it is plain, or it must be asked, with what can be read in two ways. */
export type StyleEvidence =
  | { readonly style: NumberStyle; readonly because: string }
  | { readonly style: null; readonly question: string };

/** Judges the texts of number columns. `pointsAreDoubtful`: a file that is not separated by commas may have points for thousands. */
export function judgeStyle(texts: readonly string[], pointsAreDoubtful: boolean): StyleEvidence {
  const seen: { decimal: Map<string, string>; thousands: Map<string, string>; doubt: Map<string, string> } = {
    decimal: new Map(),
    thousands: new Map(),
    doubt: new Map(),
  };
  let points = 0;
  let doubtfulPoints = 0;
  for (const text of texts) {
    const shape = shapeOf(evened(text.trim()));
    if (shape === null) continue;
    if (shape.decimal !== null && !seen.decimal.has(shape.decimal)) seen.decimal.set(shape.decimal, text);
    if (shape.thousands !== null && !seen.thousands.has(shape.thousands))
      seen.thousands.set(shape.thousands, text);
    if (shape.doubt !== null && !seen.doubt.has(shape.doubt)) seen.doubt.set(shape.doubt, text);
    if (shape.decimal === '.') points += 1;
    if (shape.doubt === '.') doubtfulPoints += 1;
  }
  return settle(seen, pointsAreDoubtful && points === 0 && doubtfulPoints > 0);
}

function settle(
  seen: {
    readonly decimal: Map<string, string>;
    readonly thousands: Map<string, string>;
    readonly doubt: Map<string, string>;
  },
  pointsAreDoubtful: boolean,
): StyleEvidence {
  const { decimal, thousands, doubt } = seen;
  const [comma, point] = [decimal.get(','), decimal.get('.')];
  if (comma !== undefined && point !== undefined) {
    return ask(
      `Some numbers have a decimal point (\`${point}\`), others a decimal comma (\`${comma}\`). Which is the decimal mark?`,
    );
  }
  const separators = [...thousands.keys()];
  if (separators.length > 1) {
    return ask(
      `Thousands are separated in more than one way: ${[...thousands.values()].map((text) => `\`${text}\``).join(', ')}. Which is right?`,
    );
  }
  const [separator] = separators;
  const mark =
    comma !== undefined
      ? ','
      : point !== undefined
        ? '.'
        : separator === ','
          ? '.'
          : separator === '.'
            ? ','
            : null;
  if (mark !== null) {
    const other = mark === ',' ? '.' : ',';
    const grouped = separator ?? (doubt.has(other) ? other : '');
    if (grouped === mark)
      return ask(
        `\`${thousands.get(mark) ?? ''}\` and \`${decimal.get(mark) ?? ''}\` use one mark for two things. Which is the decimal mark?`,
      );
    const because = [
      comma ?? point ?? null,
      separator === undefined ? (doubt.get(other) ?? null) : (thousands.get(separator) ?? null),
    ].filter((text) => text !== null);
    return {
      style: { decimal: mark, thousands: asThousands(grouped) },
      because: `As in ${because.map((text) => `\`${text}\``).join(' and ')}.`,
    };
  }
  const doubtful = doubt.get(',') ?? (pointsAreDoubtful ? doubt.get('.') : undefined);
  if (doubtful !== undefined) {
    const wide = doubtful.replace(/[.,]/u, '');
    return ask(
      `\`${doubtful}\` may be ${wide} or ${doubtful.replace(',', '.')}, and no other number tells which. What is the decimal mark?`,
    );
  }
  return {
    style: { decimal: '.', thousands: asThousands(separator ?? '') },
    because: 'No number has a mark that could be read otherwise.',
  };
}

const ask = (question: string): StyleEvidence => ({ style: null, question });

function asThousands(mark: string): NumberStyle['thousands'] {
  return mark === ',' || mark === '.' || mark === ' ' || mark === "'" ? mark : '';
}

interface Shape {
  readonly decimal: '.' | ',' | null;
  readonly thousands: string | null;
  /** A single mark before three digits. */
  readonly doubt: '.' | ',' | null;
}

function shapeOf(text: string): Shape | null {
  const digits = /^[+-]?([\d.,' ]*\d[.,]?)(?:[eE][+-]?\d+)?%?$/u.exec(text)?.[1];
  if (digits === undefined) return null;
  const spaced = /\d([ '])\d{3}/u.exec(digits)?.[1] ?? null;
  const marks = [...digits].filter((character) => character === '.' || character === ',');
  const last = marks.at(-1);
  if (last === undefined) return { decimal: null, thousands: spaced, doubt: null };
  const mark = last === ',' ? ',' : '.';
  const kinds = new Set(marks);
  if (kinds.size === 2)
    return { decimal: mark, thousands: spaced ?? (mark === ',' ? '.' : ','), doubt: null };
  if (marks.length > 1) return { decimal: null, thousands: mark, doubt: null };
  if (spaced === null && /^[1-9]\d{0,2}[.,]\d{3}$/u.test(digits))
    return { decimal: null, thousands: null, doubt: mark };
  return { decimal: mark, thousands: spaced, doubt: null };
}
