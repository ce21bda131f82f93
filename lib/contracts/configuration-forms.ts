import { z } from 'zod';
import { CATEGORIES } from '@/lib/mass/component';
import { toSi } from '@/lib/units/convert';
import { LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';
import { codeSchema, titleSchema } from './codes';
import { blankOr, numberField, wholeField } from './form-fields';

export const newConfigurationSchema = z.object({
  build: z.string('Choose a build.').min(1, 'Choose a build.'),
  code: codeSchema,
  title: titleSchema,
  /** Left blank, the issue in force. */
  frame_issue: blankOr(wholeField(1)),
});

/** The configuration that a change is made to, at the version that the person saw. */
const seen = { configuration: codeSchema, version: wholeField(1) };

export const configurationSeenSchema = z.object(seen);

export const frameChoiceSchema = z.object({ ...seen, frame_issue: wholeField(1) });

const revisionChoice = blankOr(wholeField(1));

/** Pins as the form sends them: `list:CODE` -> revision number, '' for a list that is not part; `rotors` alike. */
export const pinsFormSchema = z
  .object({ ...seen, rotors: revisionChoice })
  .catchall(z.unknown())
  .transform((form, context) => {
    const revisions: Record<string, number> = {};
    for (const [name, value] of Object.entries(form)) {
      if (!name.startsWith('list:')) continue;
      const read = revisionChoice.safeParse(value);
      if (!read.success)
        context.addIssue({ code: 'custom', path: [name], message: 'Choose a revision of this list.' });
      else if (read.data !== null) revisions[name.slice('list:'.length)] = read.data;
    }
    return { configuration: form.configuration, version: form.version, rotors: form.rotors, revisions };
  });

/** One list, or the rotating parts when `list` is blank, put on its newest revision. */
export const takeNewestSchema = z.object({
  ...seen,
  list: z.union([z.literal('').transform(() => null), codeSchema]),
  revision: wholeField(1),
});

const itemSchema = z.object({
  name: z.string().trim().min(1, 'Give every item a name.').max(200),
  category: z.enum(CATEGORIES),
  mass: numberField,
  x: numberField,
  y: numberField,
  z: numberField,
});

/** What a field of an item is called in a message. */
const WORDS: Readonly<Record<string, string>> = { name: 'name', category: 'category', mass: 'mass' };

/** A condition as its form sends it: items as JSON in one field, their figures as typed in the two units. */
export const conditionFormSchema = z
  .object({
    ...seen,
    code: codeSchema,
    title: titleSchema,
    /** `new`: there must be no condition with this code yet. */
    is_new: z.literal('on').optional(),
    categories: z.preprocess(
      (value) => (value === undefined ? [] : Array.isArray(value) ? value : [value]),
      z.array(z.enum(CATEGORIES)),
    ),
    mass_unit: z.enum(MASS_UNITS),
    length_unit: z.enum(LENGTH_UNITS),
    items: z.string().max(900_000).transform(parseItems),
  })
  .transform((form) => ({
    configuration: form.configuration,
    version: form.version,
    isNew: form.is_new === 'on',
    condition: {
      code: form.code,
      title: form.title,
      categories: form.categories,
      items: form.items.map(({ name, category, mass, x, y, z: height }) => ({
        name,
        category,
        mass: toSi(mass, form.mass_unit),
        place: [
          toSi(x, form.length_unit),
          toSi(y, form.length_unit),
          toSi(height, form.length_unit),
        ] as const,
      })),
    },
  }));

function parseItems(text: string, context: z.RefinementCtx): z.output<typeof itemSchema>[] {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (error) {
    context.addIssue({ code: 'custom', message: `The items did not arrive whole: ${String(error)}.` });
    return [];
  }
  const read = z.array(itemSchema).max(500, 'At most 500 items; more belong in a list.').safeParse(value);
  if (read.success) return read.data;
  for (const { path, message } of read.error.issues) {
    const [index, field] = path;
    const where =
      typeof index === 'number' ? `Item ${index + 1}, ${WORDS[String(field)] ?? String(field)}: ` : '';
    context.addIssue({ code: 'custom', message: `${where}${message}` });
  }
  return [];
}

export const conditionChoiceSchema = z.object({ ...seen, code: codeSchema });
