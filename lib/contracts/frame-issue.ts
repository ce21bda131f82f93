import { z } from 'zod';
import { type AxisTriple, axesProblem, DIRECTIONS } from '@/lib/frames/axes';
import { quarterChord } from '@/lib/frames/chord';
import { type Pose } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { radians, toSi } from '@/lib/units/convert';
import { LENGTH_UNITS, type LengthUnit } from '@/lib/units/table';
import { reasonSchema, titleSchema } from './codes';
import { blankOr, dateField, numberField, positiveField, tickField, wholeField } from './form-fields';

const direction = z.enum(DIRECTIONS, 'Choose where this axis points.');

const turn = blankOr(
  numberField.refine((value) => Math.abs(value) <= 180, 'It must be between -180 and 180 degrees.'),
);

/** How the frame of the issue before lies in an issue, as the forms send it; nothing is zero. */
const formerFields = {
  former_x: blankOr(numberField),
  former_y: blankOr(numberField),
  former_z: blankOr(numberField),
  former_yaw: turn,
  former_pitch: turn,
  former_roll: turn,
};

type FormerFields = z.output<z.ZodObject<typeof formerFields>> & { readonly length_unit: LengthUnit };

/** The pose of the former frame that a form states, m and rad. */
export function formerOfForm(form: FormerFields): Pose {
  const metres = (value: number | null): number => toSi(value ?? 0, form.length_unit);
  return {
    origin: [metres(form.former_x), metres(form.former_y), metres(form.former_z)],
    yaw: radians(form.former_yaw ?? 0),
    pitch: radians(form.former_pitch ?? 0),
    roll: radians(form.former_roll ?? 0),
  };
}

/** Says how the issue before an issue lies in it, where that was not stated. */
export const formerFrameSchema = z.object({
  number: wholeField(2),
  length_unit: z.enum(LENGTH_UNITS),
  ...formerFields,
});

/** A frame issue as its form sends it: lengths in `length_unit`, the incidence in degrees. */
export const frameIssueSchema = z
  .object({
    /** The newest issue that the person saw; 0 before the first. */
    base: wholeField(0),
    title: titleSchema,
    axis_x: direction,
    axis_y: direction,
    axis_z: direction,
    length_unit: z.enum(LENGTH_UNITS),
    lemac_x: numberField,
    lemac_y: numberField,
    lemac_z: numberField,
    mac: positiveField,
    span: positiveField,
    length: positiveField,
    lateral_plane: numberField,
    incidence: numberField.refine((value) => Math.abs(value) < 45, 'It must be between -45 and 45 degrees.'),
    reference_x: blankOr(numberField),
    reference_y: blankOr(numberField),
    reference_z: blankOr(numberField),
    ...formerFields,
    valid_from: dateField,
    reason: reasonSchema,
    carry_points: tickField,
  })
  .superRefine((form, context) => {
    const problem = axesProblem([form.axis_x, form.axis_y, form.axis_z]);
    if (problem !== null) context.addIssue({ code: 'custom', path: ['axis_x'], message: problem });
    const blank = (['reference_x', 'reference_y', 'reference_z'] as const).filter(
      (name) => form[name] === null,
    );
    if (blank.length === 1 || blank.length === 2)
      for (const name of blank)
        context.addIssue({
          code: 'custom',
          path: [name],
          message: 'Give all three coordinates, or none for the quarter chord.',
        });
  });

export type FrameIssueForm = z.output<typeof frameIssueSchema>;

/** The geometry that a form states, in SI; a reference point left blank is the quarter point of the mean chord. */
export function geometryOfForm(form: FrameIssueForm): AirframeGeometry {
  const metres = (value: number): number => toSi(value, form.length_unit);
  const axes: AxisTriple = [form.axis_x, form.axis_y, form.axis_z];
  const lemac = [metres(form.lemac_x), metres(form.lemac_y), metres(form.lemac_z)] as const;
  const mac = metres(form.mac);
  const { reference_x: x, reference_y: y, reference_z: z } = form;
  return {
    axes,
    lemac,
    mac,
    span: metres(form.span),
    length: metres(form.length),
    lateralPlane: metres(form.lateral_plane),
    incidence: radians(form.incidence),
    reference:
      x === null || y === null || z === null
        ? quarterChord(lemac, mac, axes)
        : [metres(x), metres(y), metres(z)],
  };
}
