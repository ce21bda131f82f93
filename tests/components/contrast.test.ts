import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync(new URL('../../app/globals.css', import.meta.url), 'utf8');
const THEMES = ['light', 'dark'] as const;
type Theme = (typeof THEMES)[number];

/** The colour of a token as app/globals.css declares it. */
function token(name: string, theme: Theme): string {
  const found = new RegExp(`--${name}: light-dark\\((#[0-9a-f]{6}), (#[0-9a-f]{6})\\);`).exec(css);
  const colour = theme === 'light' ? found?.[1] : found?.[2];
  if (!colour) throw new Error(`app/globals.css declares no colour --${name}`);
  return colour;
}

/** Relative luminance, WCAG 2.2 (https://www.w3.org/TR/WCAG22/#dfn-relative-luminance). */
function luminance(colour: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const part = parseInt(colour.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

/** Contrast ratio, WCAG 2.2 (https://www.w3.org/TR/WCAG22/#dfn-contrast-ratio). */
function contrast(one: string, other: string): number {
  const [dark, light] = [luminance(one), luminance(other)].sort((a, b) => a - b) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}

const GROUNDS = ['paper', 'sheet', 'hover', 'chosen'];
const WORDS = ['ink', 'ink-2', 'spin', 'limit', 'caution', 'pass'];
const TEXT_PAIRS: readonly (readonly [string, string])[] = [
  ...GROUNDS.flatMap((ground) => WORDS.map((word) => [word, ground] as const)),
  ['on-spin', 'spin'],
  ['on-spin', 'spin-deep'],
  ['paper', 'ink'],
  ['ink', 'plus'],
  ['ink', 'minus'],
  ['ink-2', 'plus'],
  ['ink-2', 'minus'],
];
const MARK_PAIRS = ['paper', 'sheet'].flatMap((ground) =>
  ['ink-2', 'spin', 'limit', 'caution', 'pass'].map((mark) => [mark, ground] as const),
);

describe('the colours of the look', () => {
  it('are measured by the WCAG formula: black on white is 21 to 1, #767676 on white 4.54 to 1', () => {
    // 21:1 is stated in WCAG 2.2, "contrast ratio", note 1; #767676 as the lightest passing grey is common practice.
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
    expect(contrast('#767676', '#ffffff')).toBeCloseTo(4.54, 2);
  });

  for (const theme of THEMES) {
    it.each(TEXT_PAIRS)(`set %s on %s at 4.5 to 1 or more (AA text), ${theme}`, (word, ground) => {
      expect(contrast(token(word, theme), token(ground, theme))).toBeGreaterThanOrEqual(4.5);
    });
    it.each(MARK_PAIRS)(`draw controls and marks in %s on %s at 3 to 1 or more, ${theme}`, (mark, ground) => {
      expect(contrast(token(mark, theme), token(ground, theme))).toBeGreaterThanOrEqual(3);
    });
  }

  it('are nowhere typed outside the tokens', () => {
    const tokens = css.slice(css.indexOf(':root {'), css.indexOf(":root[data-theme='light']"));
    const outside = css.replace(tokens, '').match(/#[0-9a-f]{3,6}\b(?!\w)/gi) ?? [];
    expect(outside.filter((colour) => colour !== '#fff' && colour !== '#000')).toEqual([]);
  });
});
