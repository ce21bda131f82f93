import { describe, expect, it } from 'vitest';
import { problemSentence, shorten } from '@/lib/ingest/problem-log';

describe('a problem in words', () => {
  const message = '`x` is not a number.';
  it.each([
    [214, 'izz', 'Line 214, column izz: `x` is not a number.'],
    [214, null, 'Line 214: `x` is not a number.'],
    [null, 'izz', 'Column izz: `x` is not a number.'],
    [null, null, '`x` is not a number.'],
  ])('names line %s and column %s where it has them', (line, column, sentence) => {
    expect(problemSentence({ kind: 'not-a-number', line, column, found: 'x', message })).toBe(sentence);
  });

  it('quotes one line of at most 80 characters, whole ones', () => {
    expect(shorten(' a\n\tb ')).toBe('a b');
    expect(shorten('a'.repeat(80))).toBe('a'.repeat(80));
    expect(shorten('a'.repeat(81))).toBe(`${'a'.repeat(79)}…`);
    expect(shorten('😀'.repeat(5000))).toBe(`${'😀'.repeat(79)}…`);
  });
});
