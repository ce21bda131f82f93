import { readNumber } from '@/lib/ingest/table/number-text';

import { COMMA, LOWER_E, MINUS, PLUS, POINT, UPPER_E } from './bytes';

/** Powers of ten that are exact. */
export const POWERS = Float64Array.from({ length: 23 }, (_, power) => Number(`1e${power}`));

/**
 * The number in a field, with the very bits of `readNumber` of its text; NaN where that finds fault, or where the field is better judged
 * as text. Up to 15 digits and a power of ten up to 22 give the nearest double by one exact product or quotient (Clinger 1990, How to
 * read floating point numbers accurately).
 */
export function fieldNumber(bytes: Uint8Array, start: number, end: number, decimalComma: boolean): number {
  let at = start;
  let byte = bytes[at] ?? 0;
  const negative = byte === MINUS;
  if (negative || byte === PLUS) {
    at += 1;
    byte = bytes[at] ?? 0;
  }
  let [digits, count, places] = [0, 0, 0];
  for (; at < end && byte >= 48 && byte <= 57; byte = bytes[at] ?? 0) {
    digits = digits * 10 + (byte - 48);
    count += 1;
    at += 1;
  }
  if (at < end && (byte === POINT || (decimalComma && byte === COMMA))) {
    at += 1;
    byte = bytes[at] ?? 0;
    for (; at < end && byte >= 48 && byte <= 57; byte = bytes[at] ?? 0) {
      digits = digits * 10 + (byte - 48);
      places += 1;
      at += 1;
    }
  }
  let exponent = 0;
  if (at < end && count + places > 0 && (byte === LOWER_E || byte === UPPER_E)) {
    at += 1;
    const down = bytes[at] === MINUS;
    if (down || bytes[at] === PLUS) at += 1;
    const from = at;
    for (byte = bytes[at] ?? 0; at < end && byte >= 48 && byte <= 57; byte = bytes[at] ?? 0) {
      exponent = exponent * 10 + (byte - 48);
      at += 1;
    }
    if (at === from) return NaN;
    if (down) exponent = -exponent;
  }
  if (at !== end || count + places === 0) return NaN;
  const power = exponent - places;
  if (count + places > 15 || power > 22 || power < -22) return textNumber(bytes, start, end, decimalComma);
  if (digits === 0) return 0;
  const size = power < 0 ? digits / (POWERS[-power] ?? NaN) : digits * (POWERS[power] ?? NaN);
  return negative ? -size : size;
}

function textNumber(bytes: Uint8Array, start: number, end: number, decimalComma: boolean): number {
  let text = '';
  for (let at = start; at < end; at += 1) text += String.fromCharCode(bytes[at] ?? 0);
  const value = readNumber(text, decimalComma);
  return typeof value === 'number' ? value : NaN;
}
