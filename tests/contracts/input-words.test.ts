import { expect, it } from 'vitest';
import { z } from 'zod';
import { rollUpQuerySchema } from '@/lib/contracts/api/roll-ups';
import { inputWords } from '@/lib/contracts/input-words';

const said = (schema: z.ZodType, value: unknown): string[] => {
  const read = schema.safeParse(value, { error: inputWords });
  return read.success ? [] : read.error.issues.map(({ message }) => message);
};

it('says in plain words what a value must be', () => {
  expect(said(z.enum(['kg', 'lb']), 'stone')).toEqual(['This must be one of kg, lb.']);
  expect(said(z.literal(1), 2)).toEqual(['This must be 1.']);
  expect(said(z.string(), 3)).toEqual(['This must be a text.']);
  expect(said(z.object({ mass: z.number() }), {})).toEqual(['This is missing.']);
  expect(said(z.number().positive(), 0)).toEqual(['This must be more than 0.']);
  expect(said(z.number().max(5), 6)).toEqual(['This must be at most 5.']);
  expect(said(z.string().max(2), 'abc')).toEqual(['This must have at most 2 characters.']);
  expect(said(z.array(z.number()).min(1), [])).toEqual(['This must have at least 1 entries.']);
  expect(said(z.strictObject({}), { a: 1 })).toEqual(['There is no such member here: a.']);
});

it('leaves the words that a schema has of its own', () => {
  expect(said(z.number({ error: 'Write a number.' }), 'x')).toEqual(['Write a number.']);
});

it('names the units that a roll-up takes', () => {
  const [first] = said(rollUpQuerySchema, { mass_unit: 'stone', length_unit: 'm', inertia_unit: 'kg.m2' });
  expect(first).toBe('This must be one of kg, g, lb, slug.');
});
