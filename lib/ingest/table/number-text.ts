import { shorten } from '@/lib/ingest/problem-log';

/** Why a text is not a number, and what would be right. */
export interface NumberFault {
  readonly kind: string;
  readonly message: string;
}

const POINT = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/u;
const COMMA = /^[+-]?(?:\d+,\d*|,\d+)(?:[eE][+-]?\d+)?$/u;
const THOUSANDS = /^[+-]?\d{1,3}([.,'’ \u00A0\u202F])\d{3}(?:\1\d{3})*(?:[.,]\d+)?$/u;
const NUMBER_AND_UNIT = /^[+-]?[\d.,]+ ?[%°A-Za-z]/u;

/** A decimal mark that could also be a thousands separator: 1.234, 12,500. */
export const MARK_OR_THOUSANDS = /^[+-]?[1-9]\d{0,2}[.,]\d{3}$/u;

/** Squares of products of three such numbers, the variance of a moment, are finite in any units: nothing computed from them overflows. */
const LARGEST = 1e40;

/** A finite number from a trimmed text; a decimal comma where `decimalComma` says so. Minus zero reads as zero. */
export function readNumber(text: string, decimalComma: boolean): number | NumberFault {
  const plain = decimalComma && COMMA.test(text) ? text.replace(',', '.') : text;
  if (!POINT.test(plain)) return explain(text);
  const value = Number(plain);
  if (Math.abs(value) <= LARGEST) return value === 0 ? 0 : value;
  return {
    kind: 'not-finite',
    message: `\`${shorten(text)}\` is too large. No quantity of an aircraft exceeds 1e40.`,
  };
}

function explain(text: string): NumberFault {
  const shown = `\`${shorten(text)}\``;
  if (/^[=@]/u.test(text)) {
    const message = `${shown} is a formula. Export the values of the sheet, not its formulas.`;
    return { kind: 'formula', message };
  }
  if (text.startsWith('#')) {
    return { kind: 'formula', message: `${shown} is an error of the spreadsheet. Mend its formula there.` };
  }
  if (/^[+-]?(?:nan|inf|infinity)$/iu.test(text)) {
    return { kind: 'not-finite', message: `${shown} is not a finite number. Write the value.` };
  }
  const separator = THOUSANDS.exec(text)?.[1];
  if (separator !== undefined) {
    const whole = text.replaceAll(separator, '').replace(',', '.');
    const comma = COMMA.test(text)
      ? `, or \`${text.replace(',', '.')}\` if the comma is the decimal mark`
      : '';
    const message = `${shown} has a thousands separator. Write \`${whole}\`${comma}.`;
    return { kind: 'thousands-separator', message };
  }
  if (COMMA.test(text)) {
    const message =
      `${shown} has a decimal comma. Write \`${text.replace(',', '.')}\`; ` +
      'only files separated by semicolons may use a decimal comma.';
    return { kind: 'decimal-comma', message };
  }
  const ascii = text.replace(/[\u2212\u2013]/gu, '-');
  if (ascii !== text && POINT.test(ascii)) {
    return { kind: 'not-a-number', message: `${shown} has a dash for its minus sign. Write \`${ascii}\`.` };
  }
  const remedy = NUMBER_AND_UNIT.test(text)
    ? 'Write the number alone; units are declared once for the list.'
    : 'Write digits with a decimal point, for example `12.45` or `1.2e-3`.';
  return { kind: 'not-a-number', message: `${shown} is not a number. ${remedy}` };
}
