import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readNumber } from '@/lib/ingest/table/number-text';

describe('a number in a cell', () => {
  it('is what JavaScript reads from the same decimal text', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, min: -1e40, max: 1e40 }), (value) => {
        expect(readNumber(String(value), false)).toBe(value === 0 ? 0 : value);
        expect(readNumber(value.toExponential(), false)).toBe(value === 0 ? 0 : value);
      }),
      { seed: 43 },
    );
  });

  it.each([
    ['+1.5', 1.5],
    ['.5', 0.5],
    ['5.', 5],
    ['-0', 0],
    ['1e3', 1000],
    ['1E-3', 0.001],
    ['007', 7],
  ])('%s reads %d', (text, value) => {
    expect(readNumber(text, false)).toBe(value);
    expect(readNumber(text, true)).toBe(value);
  });

  it.each([
    ['1,5', 1.5],
    [',5', 0.5],
    ['-1,25e2', -125],
  ])('%s reads %d where a decimal comma is allowed, and is refused elsewhere', (text, value) => {
    expect(readNumber(text, true)).toBe(value);
    expect(readNumber(text, false)).toMatchObject({ kind: 'decimal-comma' });
  });

  it.each(['1.2.3', '1e', 'e5', '--1', '1-', '١٢', '1_000', '0x10', '1d3', '+', '.', ',', '12,4.5', 'one'])(
    '%s is no number',
    (text) => {
      expect(readNumber(text, false)).toMatchObject({ kind: 'not-a-number' });
    },
  );

  it.each(['1e61', '-1e61', '1e400'])('%s is too large', (text) => {
    expect(readNumber(text, false)).toMatchObject({ kind: 'not-finite' });
  });

  it('takes no more time for a long text that is none', () => {
    const long = `${'1'.repeat(8192)}x`;
    const begin = performance.now();
    for (let run = 0; run < 100; run += 1)
      expect(readNumber(long, false)).toMatchObject({ kind: 'not-a-number' });
    expect(performance.now() - begin).toBeLessThan(2000);
  });
});
