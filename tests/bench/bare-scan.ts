import { openSync, readSync, closeSync } from 'node:fs';

const COMMA = 44;
const NEWLINE = 10;
const BLOCK = 65_536;

const POWERS = Float64Array.from({ length: 23 }, (_, k) => Number(`1e${k}`));

/** What a bare scan found: its sum is there so that no conversion can be left out. */
export interface Scanned {
  readonly rows: number;
  readonly sum: number;
}

/**
 * The measure of the reader's speed: one plain loop over the bytes of a file of the bench that splits its fields at commas and line
 * ends and converts the numbers of the columns from `first` to `last`, and does nothing else. It knows no quotes, checks nothing.
 */
export function bareScan(path: string, isNumber: readonly boolean[]): Scanned {
  const numbers = Uint8Array.from(isNumber, Number);
  const buffer = new Uint8Array(2 * BLOCK);
  const file = openSync(path, 'r');
  let [kept, rows, sum] = [0, 0, 0];
  for (;;) {
    const read = readSync(file, buffer, kept, BLOCK, null);
    if (read === 0) break;
    const filled = kept + read;
    const end = buffer.lastIndexOf(NEWLINE, filled - 1) + 1;
    const found = scanBlock(buffer, end, numbers);
    rows += found.rows;
    sum += found.sum;
    buffer.copyWithin(0, end, filled);
    kept = filled - end;
  }
  closeSync(file);
  return { rows, sum };
}

function scanBlock(buffer: Uint8Array, end: number, numbers: Uint8Array): Scanned {
  let [at, rows, sum, column] = [0, 0, 0, 0];
  while (at < end) {
    let byte = buffer[at] ?? 0;
    if (numbers[column] === 1 && byte !== COMMA && byte !== NEWLINE) {
      let negative = false;
      if (byte === 45) {
        negative = true;
        at += 1;
        byte = buffer[at] ?? 0;
      }
      let [digits, places, exponent] = [0, 0, 0];
      while (byte >= 48 && byte <= 57) {
        digits = digits * 10 + (byte - 48);
        at += 1;
        byte = buffer[at] ?? 0;
      }
      if (byte === 46) {
        at += 1;
        byte = buffer[at] ?? 0;
        while (byte >= 48 && byte <= 57) {
          digits = digits * 10 + (byte - 48);
          places += 1;
          at += 1;
          byte = buffer[at] ?? 0;
        }
      }
      if (byte === 101) {
        at += 1;
        const down = buffer[at] === 45;
        if (down) at += 1;
        byte = buffer[at] ?? 0;
        while (byte >= 48 && byte <= 57) {
          exponent = exponent * 10 + (byte - 48);
          at += 1;
          byte = buffer[at] ?? 0;
        }
        if (down) exponent = -exponent;
      }
      const power = exponent - places;
      const value = power < 0 ? digits / (POWERS[-power] ?? 1) : digits * (POWERS[power] ?? 1);
      sum += negative ? -value : value;
    } else {
      while (byte !== COMMA && byte !== NEWLINE) {
        at += 1;
        byte = buffer[at] ?? 0;
      }
    }
    column += 1;
    at += 1;
    if (byte === NEWLINE) {
      column = 0;
      rows += 1;
    }
  }
  return { rows, sum };
}
