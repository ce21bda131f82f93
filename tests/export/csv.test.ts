import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { csvLine } from '@/lib/export/csv';
import { neutraliseFormula, restoreFormula } from '@/lib/export/formula-text';

const texts = fc.oneof(
  fc.string(),
  fc.string({ unit: fc.constantFrom('=', '+', '-', '@', "'", '"', ',', '\t', '\r', '\n', 'a', '1', '.') }),
);

describe('a line of CSV', () => {
  it('is read back by papaparse as the cells that were written', () => {
    fc.assert(
      fc.property(fc.array(texts, { minLength: 1 }), (cells) => {
        const line = csvLine(cells);
        expect(line.endsWith('\r\n')).toBe(true);
        const { data, errors } = Papa.parse<string[]>(line.slice(0, -2), { delimiter: ',', newline: '\r\n' });
        expect(errors).toEqual([]);
        // papaparse reads an empty text as no row at all.
        expect(data[0] ?? ['']).toEqual(cells.map(neutraliseFormula));
      }),
      { seed: 50, numRuns: 500 },
    );
  });

  it('holds no text that a spreadsheet would run (OWASP, CSV Injection: = + - @ tab and CR)', () => {
    expect(csvLine(['=1+1', '@SUM(A1)', '+A1', '-A1', '\tx', '\rx', "'=1"])).toBe(
      `'=1+1,'@SUM(A1),'+A1,'-A1,"'\tx","'\rx",''=1\r\n`,
    );
    fc.assert(
      fc.property(texts, (text) => {
        const written = neutraliseFormula(text);
        expect(/^[=+\-@\t\r]/u.test(written) && Number.isNaN(Number(written))).toBe(false);
        expect(restoreFormula(written)).toBe(text);
      }),
      { seed: 51, numRuns: 1000 },
    );
  });

  it('writes numbers in full and blanks for nothing', () => {
    expect(csvLine([-0.1, 1e21, 5, null, '-12.5', ' edge ', 'a,b', 'say "x"'])).toBe(
      '-0.1,1e+21,5,,-12.5," edge ","a,b","say ""x"""\r\n',
    );
    const value = 0.1 + 0.2;
    expect(Number(csvLine([value]))).toBe(value);
  });

  it.each([NaN, Infinity, -Infinity])('refuses %d', (value) => {
    expect(() => csvLine([value])).toThrow(RangeError);
  });
});
