import { type Cells } from '@/lib/ingest/table/cells';
import { type Rotor, type SpinAxis } from '@/lib/rotors/rotor';
import { radians } from '@/lib/units/convert';
import { type Factor } from '@/lib/units/table';

const ARROW = ['axis_x', 'axis_y', 'axis_z'] as const;
const ANGLES = ['axis_yaw', 'axis_pitch'] as const;
/** Angles in degrees stay below these; steeper axes need an arrow (domain section 7). */
const STEEPEST = { axis_yaw: 90, axis_pitch: 60 } as const;

/** The columns of a file of rotating parts (contract section 2). */
export type RotorColumn =
  | 'rotor'
  | 'polar_inertia'
  | (typeof ARROW)[number]
  | (typeof ANGLES)[number]
  | 'sense'
  | 'gear_ratio'
  | 'shaft'
  | 'component'
  | 'blades'
  | 'polar_inertia_sigma'
  | 'group'
  | 'note';

export const ROTOR_COLUMNS: readonly RotorColumn[] = [
  'rotor',
  'polar_inertia',
  ...ARROW,
  ...ANGLES,
  'sense',
  'gear_ratio',
  'shaft',
  'component',
  'blades',
  'polar_inertia_sigma',
  'group',
  'note',
];

type RotorCells = Cells<RotorColumn>;

/** The rotor of the row that `cells` holds, in SI, or null when something in it is wrong (which is in the log). */
export function readRotor(cells: RotorCells, unit: Factor): Rotor | null {
  const before = cells.problems;
  const rotor = cells.neededText('rotor');
  const inertia = cells.neededNumber('polar_inertia');
  if (inertia !== undefined && inertia <= 0) {
    cells.problem(
      'not-positive',
      'polar_inertia',
      `${cells.quoted('polar_inertia')} is not greater than zero.`,
    );
  }
  const sigma = cells.number('polar_inertia_sigma') ?? null;
  if (sigma !== null && sigma < 0) {
    const message = `${cells.quoted('polar_inertia_sigma')} is negative. An uncertainty is zero or more.`;
    cells.problem('negative-sigma', 'polar_inertia_sigma', message);
  }
  const gearRatio = cells.number('gear_ratio') ?? 1;
  if (gearRatio <= 0) {
    const message =
      `${cells.quoted('gear_ratio')} is not greater than zero. Write rotor speed over shaft speed; ` +
      'the sense says which way it turns.';
    cells.problem('not-positive', 'gear_ratio', message);
  }
  const component = cells.text('component');
  if (component !== null && !/^[^/]+\/./u.test(component)) {
    const message = `${cells.quoted('component')} names no row. Write list/item, for example \`engines/PROP-L\`.`;
    cells.problem('not-a-row', 'component', message);
  }
  const blades = cells.count('blades') ?? null;
  const axis = readAxis(cells);
  if (rotor === null || inertia === undefined || axis === null || cells.problems > before) return null;
  return {
    rotor,
    polarInertia: (inertia * unit.times) / unit.over,
    axis,
    gearRatio,
    shaft: cells.text('shaft') ?? rotor,
    component,
    blades,
    polarInertiaSigma: sigma === null ? null : (sigma * unit.times) / unit.over,
    group: cells.text('group'),
    note: cells.text('note'),
  };
}

/** An arrow with a hand, or angles with a sense; one of both and the word that goes with it. */
function readAxis(cells: RotorCells): SpinAxis | null {
  const arrow = ARROW.some((column) => cells.raw(column) !== '');
  const angles = ANGLES.some((column) => cells.raw(column) !== '');
  if (arrow === angles) {
    const which = arrow ? 'both an arrow and angles' : 'neither an arrow nor angles';
    const message = `The row has ${which}. Give axis_x, axis_y and axis_z, or axis_yaw and axis_pitch.`;
    cells.problem('axis', cells.has('axis_x') ? 'axis_x' : 'axis_yaw', message);
    return null;
  }
  return arrow ? readArrow(cells) : readAngles(cells);
}

function readArrow(cells: RotorCells): SpinAxis | null {
  const [x, y, z] = ARROW.map((column) => cells.neededNumber(column));
  const hand = readSense(
    cells,
    ['rh', 'lh'],
    'an arrow along the shaft takes rh or lh, the hand of its spin',
  );
  if (x === undefined || y === undefined || z === undefined || hand === null) return null;
  if (x === 0 && y === 0 && z === 0) {
    cells.problem(
      'axis',
      'axis_x',
      'The arrow along the shaft has no length. Any length above zero will do.',
    );
    return null;
  }
  return { kind: 'arrow', x, y, z, hand };
}

function readAngles(cells: RotorCells): SpinAxis | null {
  const [yaw, pitch] = ANGLES.map((column) => {
    const degrees = cells.neededNumber(column);
    if (degrees === undefined || Math.abs(degrees) < STEEPEST[column]) return degrees;
    const message =
      `${cells.quoted(column)} degrees is too steep for angles (less than ${STEEPEST[column]}). ` +
      'Give the axis as an arrow and a hand.';
    cells.problem('axis', column, message);
    return undefined;
  });
  const sense = readSense(cells, ['cw', 'ccw'], 'angles take cw or ccw, seen from behind looking forward');
  if (yaw === undefined || pitch === undefined || sense === null) return null;
  return { kind: 'angles', yaw: radians(yaw), pitch: radians(pitch), sense };
}

function readSense<S extends string>(cells: RotorCells, senses: readonly S[], rule: string): S | null {
  if (cells.neededText('sense') === null) return null;
  const text = cells.raw('sense').toLowerCase();
  const sense = senses.find((candidate) => candidate === text);
  if (sense !== undefined) return sense;
  cells.problem('sense', 'sense', `${cells.quoted('sense')} does not fit the axis of this row: ${rule}.`);
  return null;
}
