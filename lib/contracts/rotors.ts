import { z } from 'zod';
import { type OperatingPoint, type ShaftSpeed } from '@/lib/rotors/rotor';
import { radiansPerSecond } from '@/lib/units/convert';
import { INERTIA_UNITS } from '@/lib/units/table';
import { reasonSchema } from './codes';
import { blankOr, numberField, wholeField } from './form-fields';
import { problemSchema } from './list-imports';

/** A file of rotating parts or of operating points is at most this long, bytes. */
export const ROTOR_FILE_BYTES = 8 * 1024 ** 2;

const revision = { base: wholeField(0), reason: reasonSchema };

/** What goes with an uploaded file: what is in it, and the revision that the person saw (0 before the first). */
export const rotorFileSchema = z.discriminatedUnion('content', [
  z.object({
    content: z.literal('rotors'),
    inertia_unit: z.enum(INERTIA_UNITS, 'Declare the unit of the inertias: it is never guessed.'),
    ...revision,
  }),
  z.object({ content: z.literal('points'), ...revision }),
]);
export type RotorFile = z.output<typeof rotorFileSchema>;

/** What became of a file: a revision, or problems and no revision. */
export const rotorFileAnswerSchema = z.discriminatedUnion('status', [
  z.object({
    status: z.literal('revised'),
    revision: z.number().int(),
    count: z.number().int(),
    unread: z.array(z.string()).describe('Columns of the file that are not those of the contract'),
  }),
  z.object({
    status: z.literal('problems'),
    problems: z.array(problemSchema).describe('The first 200'),
    total: z.number().int(),
  }),
]);
export type RotorFileAnswer = z.output<typeof rotorFileAnswerSchema>;

const pointSchema = z.object({
  code: z.string().trim().min(1, 'Give every point a code.').max(100),
  title: z.string().trim().max(200),
  speeds: z
    .array(z.object({ shaft: z.string().min(1).max(200), rpm: z.string(), sigma: z.string() }))
    .max(500),
});

/** The grid of operating points as its page sends it: JSON in one field, speeds as typed in rpm, '' for none. */
export const pointsFormSchema = z.object({
  ...revision,
  points: z
    .string()
    .max(900_000)
    .transform((text, context): unknown => {
      try {
        return JSON.parse(text) as unknown;
      } catch (error) {
        context.addIssue({ code: 'custom', message: `The grid did not arrive whole: ${String(error)}.` });
        return z.NEVER;
      }
    })
    .pipe(z.array(pointSchema).max(500))
    .transform((points, context): OperatingPoint[] => {
      const say = (message: string) => context.addIssue({ code: 'custom', message });
      const codes = points.map(({ code }) => code);
      const twice = codes.find((code, index) => codes.indexOf(code) !== index);
      if (twice !== undefined) say(`Two points have the code ${twice}.`);
      return points.map(({ code, title, speeds }) => ({
        code,
        title: title === '' ? code : title,
        speeds: speeds.flatMap((speed) =>
          readSpeed(speed, (fault) => say(`${code}, ${speed.shaft}: ${fault}`)),
        ),
      }));
    }),
});

const figure = blankOr(numberField);

/** One cell of the grid in rad/s; nothing for a blank one. */
function readSpeed(
  { shaft, rpm, sigma }: { readonly shaft: string; readonly rpm: string; readonly sigma: string },
  say: (fault: string) => void,
): ShaftSpeed[] {
  const [speed, spread] = [rpm, sigma].map((text) => {
    const read = figure.safeParse(text);
    if (!read.success) say(read.error.issues.map(({ message }) => message).join(' '));
    return read.success ? read.data : undefined;
  });
  if (speed === null && typeof spread === 'number')
    say('there is an uncertainty and no speed. Give the speed, or 0.');
  if (typeof spread === 'number' && spread < 0) say('an uncertainty is zero or more.');
  if (typeof speed !== 'number' || spread === undefined) return [];
  const inSi = { shaft, speed: radiansPerSecond(speed) };
  return [{ ...inSi, sigma: spread === null ? null : radiansPerSecond(spread) }];
}
