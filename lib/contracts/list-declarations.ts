import { z } from 'zod';
import { DIRECTIONS } from '@/lib/frames/axes';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { degreesAsTyped, radians, toSi, asTyped } from '@/lib/units/convert';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';

const direction = z.enum(DIRECTIONS);

/** Three axis words, as `aft,right,up` or as an array. */
const axes = z
  .preprocess(
    (value) =>
      typeof value === 'string' ? value.split(',').map((word) => word.trim().toLowerCase()) : value,
    z.tuple([direction, direction, direction]),
  )
  .refine(spanSpace, 'The three axes must be one each of aft or forward, right or left, up or down.')
  .describe('Directions of +x, +y, +z, e.g. aft,right,up');

const finite = z.number().finite();

// A mistyped member would leave a default in force unseen.
const frame = z
  .strictObject({
    origin: z
      .strictObject({ x: finite.default(0), y: finite.default(0), z: finite.default(0) })
      .default({ x: 0, y: 0, z: 0 })
      .describe("Origin of the list's frame in airframe components, in the list's length unit"),
    yaw: finite.default(0).describe('deg'),
    pitch: finite.default(0).describe('deg'),
    roll: finite.default(0).describe('deg'),
  })
  .default({ origin: { x: 0, y: 0, z: 0 }, yaw: 0, pitch: 0, roll: 0 });

/**
 * What a list declares once for all its rows (contract section 1), in the file's own units. The three units have no default: a
 * number without a declared unit is an error.
 */
export const listDeclarationsSchema = z.object({
  mass_unit: z.enum(MASS_UNITS).describe('Unit of mass in the file; lb is mass'),
  length_unit: z.enum(LENGTH_UNITS).describe('Unit of x, y, z in the file'),
  inertia_unit: z.enum(INERTIA_UNITS).describe('Unit of the moments and products in the file'),
  products: z
    .enum(['positive', 'negative'])
    .default('positive')
    .describe(
      'positive: a product column holds +∫xy dm; negative: the sign is already that of the tensor element',
    ),
  axes: axes.default(['aft', 'right', 'up']),
  frame,
  kind: z.enum(['components', 'adjustments']).default('components'),
  extent: z
    .enum(['whole', 'left-half', 'right-half'])
    .default('whole')
    .describe('A half list stands for itself and its mirror image across the plane of symmetry'),
  uncertainty: z
    .enum(['1sigma', '2sigma', '3sigma', 'half-width'])
    .default('1sigma')
    .describe('What the *_sigma columns hold; half-width: of a uniform band'),
  marking: z.string().trim().min(1).max(200).nullable().default(null),
});

export type ListDeclarationsInput = z.input<typeof listDeclarationsSchema>;
export type ListDeclarationsBody = z.output<typeof listDeclarationsSchema>;

/** Declarations in SI, as the engine takes them. */
export function declarationsFromBody(body: ListDeclarationsBody): ListDeclarations {
  const { origin } = body.frame;
  const metres = (value: number): number => toSi(value, body.length_unit);
  return {
    massUnit: body.mass_unit,
    lengthUnit: body.length_unit,
    inertiaUnit: body.inertia_unit,
    products: body.products,
    axes: body.axes,
    pose: {
      origin: [metres(origin.x), metres(origin.y), metres(origin.z)],
      yaw: radians(body.frame.yaw),
      pitch: radians(body.frame.pitch),
      roll: radians(body.frame.roll),
    },
    kind: body.kind,
    extent: body.extent,
    uncertainty: body.uncertainty,
    marking: body.marking,
  };
}

/** The same declarations as a person wrote them: the file's units and degrees. */
export function declarationsToBody(declarations: ListDeclarations): ListDeclarationsBody {
  const { pose } = declarations;
  const typed = (value: number): number => asTyped(value, declarations.lengthUnit);
  return {
    mass_unit: declarations.massUnit,
    length_unit: declarations.lengthUnit,
    inertia_unit: declarations.inertiaUnit,
    products: declarations.products,
    axes: [...declarations.axes],
    frame: {
      origin: { x: typed(pose.origin[0]), y: typed(pose.origin[1]), z: typed(pose.origin[2]) },
      yaw: degreesAsTyped(pose.yaw),
      pitch: degreesAsTyped(pose.pitch),
      roll: degreesAsTyped(pose.roll),
    },
    kind: declarations.kind,
    extent: declarations.extent,
    uncertainty: declarations.uncertainty,
    marking: declarations.marking,
  };
}

function spanSpace(words: readonly string[]): boolean {
  const lines = [
    ['aft', 'forward'],
    ['right', 'left'],
    ['up', 'down'],
  ];
  return lines.every((line) => words.filter((word) => line.includes(word)).length === 1);
}
