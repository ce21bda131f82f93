import { z } from 'zod';
import { axesProblem } from '@/lib/frames/axes';
import { codeSchema, reasonSchema, titleSchema } from './codes';
import { blankOr, wholeField } from './form-fields';
import { type ListDeclarationsBody, listDeclarationsSchema } from './list-declarations';

/** Which old revision is brought back, over which newest one, and why. */
export const restoreSchema = z.object({
  list: codeSchema,
  revision: wholeField(1),
  newest: wholeField(1),
  reason: reasonSchema,
});

const NUMBER = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/;

/** A number as typed with a decimal point; nothing is zero. */
const typedNumber = z
  .string()
  .default('')
  .transform((text, context) => {
    if (text === '') return 0;
    const value = NUMBER.test(text) ? Number(text) : NaN;
    if (Number.isFinite(value)) return value;
    context.addIssue({
      code: 'custom',
      message: `"${text}" is not a number. Write it with a decimal point.`,
    });
    return z.NEVER;
  });

const chosen = (shape: z.ZodType, words: string) =>
  z
    .string()
    .default('')
    .refine((text) => shape.safeParse(text).success, words);
const { mass_unit, length_unit, inertia_unit } = listDeclarationsSchema.shape;

/** The fields of the form by which a list is declared, as texts: one field per figure. */
const fields = {
  title: titleSchema,
  mass_unit: chosen(
    mass_unit,
    'Choose the unit of mass. A number without a declared unit is never guessed at.',
  ),
  length_unit: chosen(length_unit, 'Choose the unit of x, y and z.'),
  inertia_unit: chosen(inertia_unit, 'Choose the unit of the moments and products of inertia.'),
  products: z
    .string()
    .default('')
    .refine((text) => text === 'positive' || text === 'negative', 'Choose the sign of the products.'),
  axis_x: z.string().default(''),
  axis_y: z.string().default(''),
  axis_z: z.string().default(''),
  origin_x: typedNumber,
  origin_y: typedNumber,
  origin_z: typedNumber,
  yaw: typedNumber,
  pitch: typedNumber,
  roll: typedNumber,
  /** Number of the frame issue that coming files are stated in; left out, as it was. */
  frame_issue: blankOr(wholeField(1)),
  kind: z.string(),
  extent: z.string(),
  uncertainty: z.string(),
  marking: z.string().max(200, 'A marking has at most 200 characters.').default(''),
};

type Typed = z.output<z.ZodObject<typeof fields>>;

/** What the fields say as the declarations of the contract; the three axes must span space. */
function toDeclarations(typed: Typed, context: z.RefinementCtx): ListDeclarationsBody {
  const axes = [typed.axis_x, typed.axis_y, typed.axis_z];
  const problem = axesProblem(axes);
  if (problem !== null) context.addIssue({ code: 'custom', path: ['axis_x'], message: problem });
  const parsed = listDeclarationsSchema.safeParse({
    mass_unit: typed.mass_unit,
    length_unit: typed.length_unit,
    inertia_unit: typed.inertia_unit,
    products: typed.products,
    axes,
    frame: {
      origin: { x: typed.origin_x, y: typed.origin_y, z: typed.origin_z },
      yaw: typed.yaw,
      pitch: typed.pitch,
      roll: typed.roll,
    },
    kind: typed.kind,
    extent: typed.extent,
    uncertainty: typed.uncertainty,
    marking: typed.marking === '' ? null : typed.marking,
  });
  if (parsed.success) return parsed.data;
  if (problem === null)
    for (const { path, message } of parsed.error.issues)
      context.addIssue({ code: 'custom', path: [String(path[0] ?? '')], message });
  return z.NEVER;
}

export const newListSchema = z.object({ code: codeSchema, ...fields }).transform((typed, context) => ({
  code: typed.code,
  title: typed.title,
  ...(typed.frame_issue === null ? {} : { frameIssue: typed.frame_issue }),
  declarations: toDeclarations(typed, context),
}));

export const changeListSchema = z.object({ list: z.string(), ...fields }).transform((typed, context) => ({
  list: typed.list,
  title: typed.title,
  ...(typed.frame_issue === null ? {} : { frameIssue: typed.frame_issue }),
  declarations: toDeclarations(typed, context),
}));

/** A list's title and declarations as the form's fields hold them. */
export function listFormValues(title: string, body: ListDeclarationsBody): Readonly<Record<string, string>> {
  const { frame, axes } = body;
  const nothing = (value: number): string => (value === 0 ? '' : String(value));
  return {
    title,
    mass_unit: body.mass_unit,
    length_unit: body.length_unit,
    inertia_unit: body.inertia_unit,
    products: body.products,
    axis_x: axes[0],
    axis_y: axes[1],
    axis_z: axes[2],
    origin_x: nothing(frame.origin.x),
    origin_y: nothing(frame.origin.y),
    origin_z: nothing(frame.origin.z),
    yaw: nothing(frame.yaw),
    pitch: nothing(frame.pitch),
    roll: nothing(frame.roll),
    kind: body.kind,
    extent: body.extent,
    uncertainty: body.uncertainty,
    marking: body.marking ?? '',
  };
}

/** Carries a list to another frame issue. */
export const carrySchema = z.object({
  list: codeSchema,
  /** The newest revision that the person saw; 0 before the first. */
  newest: wholeField(0),
  frame_issue: wholeField(1),
  reason: reasonSchema,
});
