import { renderToStaticMarkup } from 'react-dom/server';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Num } from '@/components/mass/num';
import {
  decimalsFor,
  digitGroups,
  numberText,
  plainText,
  sharedDecimals,
} from '@/components/mass/number-text';

const visible = (markup: string) => markup.replace(/<span class="num-pad".*$/, '').replace(/<[^>]*>/g, '');

describe('a number on the page', () => {
  it('keeps its full precision in its value and title, whatever is shown', () => {
    const markup = renderToStaticMarkup(<Num value={12.345678901} unit="kg" decimals={2} />);
    expect(markup).toContain('value="12.345678901"');
    expect(markup).toContain('title="12.345678901 kg"');
    expect(visible(markup)).toBe('12.35');
  });

  it('is converted from SI by its unit, which is set in print', () => {
    // NIST SP 811 (2008), B.8: 1 slug = 14.59390 kg, 1 ft = 0.3048 m.
    const markup = renderToStaticMarkup(
      <Num value={14.5939 * 0.3048 ** 2} unit="slug.ft2" digits={6} showUnit />,
    );
    expect(visible(markup)).toBe('1.00000 slug·ft²');
  });

  it('is copied as plain ASCII: digit groups are no characters and the minus is a hyphen-minus', () => {
    expect(visible(renderToStaticMarkup(<Num value={-1234567.8} decimals={1} />))).toBe('-1234567.8');
  });

  it('that is too small for its decimals is not shown as zero', () => {
    expect(plainText(numberText(-0.000321, 2))).toBe('-3.2e-4');
    expect(plainText(numberText(0, 2))).toBe('0.00');
    expect(plainText(numberText(-0, 2, true))).toBe('0.00');
  });

  it('that is absent is a dash for the eye and a word for the ear', () => {
    const markup = renderToStaticMarkup(<Num value={null} />);
    expect(markup).toContain('aria-hidden="true">–<');
    expect(markup).toContain('sr-only">none<');
  });

  it('leaves room for the decimals of its column, so that points stand under each other', () => {
    const room = (markup: string) =>
      markup.replace(/<[^>]*>/g, '').length - markup.replace(/<[^>]*>/g, '').indexOf('.');
    const all = [1, 1.5, 1.25, 1.12345].map((value) =>
      renderToStaticMarkup(<Num value={value} decimals={decimalsOf(value)} padTo={5} />),
    );
    expect(new Set(all.map(room))).toEqual(new Set([6]));
    const gaps = (markup: string) => markup.split('class="num-group"').length;
    expect(new Set(all.map(gaps))).not.toContain(1);
  });

  it('says the value it was given, to half a unit of its last decimal', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e9, max: 1e9, noNaN: true }),
        fc.integer({ min: 0, max: 9 }),
        (value, decimals) => {
          const text = numberText(value, decimals);
          const error = Math.abs(Number(plainText(text)) - value);
          const bound = text.exponent
            ? Math.abs(value) * 0.051
            : 0.5 * 10 ** -decimals * (1 + 1e-9) + Math.abs(value) * 1e-15;
          expect(error).toBeLessThanOrEqual(bound);
        },
      ),
    );
  });
});

describe('the decimals of a set of numbers', () => {
  it('show two digits of the smallest standard deviation, as JCGM 100:2008, 7.2.6 advises', () => {
    // The example there: a result of 10.05762 ohm with uc = 27 mohm is given as 10.058 ohm.
    const decimals = sharedDecimals([10.05762], [0.027]);
    expect(plainText(numberText(10.05762, decimals))).toBe('10.058');
  });

  it('show six significant digits of the largest where no deviation is known', () => {
    expect(sharedDecimals([148233.4, -212.43])).toBe(0);
    expect(sharedDecimals([1.5, 0.25])).toBe(5);
    expect(decimalsFor(0, 6)).toBe(0);
  });
});

describe('digit groups', () => {
  it('are counted from the decimal point, as ISO 80000-1, 7.3.1 sets them', () => {
    expect(digitGroups('1234567', 'right')).toEqual(['1', '234', '567']);
    expect(digitGroups('1234567', 'left')).toEqual(['123', '456', '7']);
    expect(digitGroups('', 'left')).toEqual([]);
  });
});

function decimalsOf(value: number): number {
  return (String(value).split('.')[1] ?? '').length;
}
