import { describe, expect, it } from 'vitest';
import { conditionFormSchema, pinsFormSchema } from '@/lib/contracts/configuration-forms';
import { blankOr, numberField, wholeField } from '@/lib/contracts/form-fields';
import { POUND } from '@/lib/units/table';

const SEEN = { configuration: 'flight', version: '4' };
const item = (part: Record<string, string>) => ({
  name: 'Pilot',
  category: 'operating',
  mass: '100',
  x: '10',
  y: '-1',
  z: '0',
  ...part,
});
const condition = (items: unknown[], more: Record<string, unknown> = {}) =>
  conditionFormSchema.safeParse({
    ...SEEN,
    code: 'take-off',
    title: 'Take-off',
    mass_unit: 'lb',
    length_unit: 'in',
    categories: ['empty', 'fuel'],
    items: JSON.stringify(items),
    ...more,
  });

describe('a number in a form', () => {
  it('takes a decimal point and refuses the rest in words', () => {
    expect(numberField.parse(' -1.5e3 ')).toBe(-1500);
    for (const text of ['', '1,5', '1.000.000', 'NaN', '=A1', '12 kg', '1e999'])
      expect(numberField.safeParse(text).success, text).toBe(false);
    expect(numberField.safeParse('1,5').error?.issues[0]?.message).toContain('decimal point');
  });
});

describe('a field that may be left blank', () => {
  it('is null when blank or not sent, and says what is wrong with anything else', () => {
    const field = blankOr(wholeField(1));
    expect([field.parse(''), field.parse(undefined), field.parse(' 7 ')]).toEqual([null, null, 7]);
    expect(field.safeParse('0').error?.issues[0]?.message).toBe('It must be at least 1.');
    expect(field.safeParse('x').error?.issues[0]?.message).toBe('Enter a whole number.');
  });
});

describe('the form of a condition', () => {
  it('is read into SI by the exact factors: 1 lb = 0.45359237 kg, 1 in = 0.0254 m (NIST SP 811)', () => {
    const read = condition([item({})]).data?.condition;
    expect(read?.items[0]?.mass).toBe(100 * POUND);
    expect(read?.items[0]?.place[0]).toBeCloseTo(0.254, 15);
    expect(read?.categories).toEqual(['empty', 'fuel']);
  });

  it('takes one ticked category, and none', () => {
    expect(condition([], { categories: 'fuel' }).data?.condition.categories).toEqual(['fuel']);
    expect(condition([], { categories: undefined }).data?.condition.categories).toEqual([]);
  });

  it('names the item and the field that are wrong', () => {
    const messages = condition([item({}), item({ name: ' ', mass: 'ten' })]).error?.issues.map(
      ({ message, path }) => [path[0], message],
    );
    expect(messages).toEqual([
      ['items', 'Item 2, name: Give every item a name.'],
      ['items', expect.stringContaining('Item 2, mass: `ten` is not a number')],
    ]);
  });
});

describe('the choice of revisions', () => {
  it('leaves out lists that are not part, and names the one whose choice is none', () => {
    const read = pinsFormSchema.parse({ ...SEEN, 'list:wing': '3', 'list:tail': '', rotors: '' });
    expect(read).toEqual({ configuration: 'flight', version: 4, rotors: null, revisions: { wing: 3 } });
    const wrong = pinsFormSchema.safeParse({ ...SEEN, 'list:wing': 'newest', rotors: '2' });
    expect(wrong.error?.issues.map(({ path }) => path)).toEqual([['list:wing']]);
  });
});
