import { Cells } from '@/lib/ingest/table/cells';
import { ROTOR_LIMITS } from '@/lib/ingest/limits';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { ROTOR_COLUMNS, type RotorColumn, readRotor } from '@/lib/ingest/rotor-row';
import { type Rotor } from '@/lib/rotors/rotor';
import { asTyped, degreesAsTyped } from '@/lib/units/convert';
import { FACTORS, type InertiaUnit } from '@/lib/units/table';

/** The columns of a rotor as they are typed; one that is left out is blank. */
export type RotorTexts = Readonly<Partial<Record<RotorColumn, string>>>;

export interface RotorReading {
  /** In SI; null when something is wrong. */
  readonly rotor: Rotor | null;
  readonly problems: readonly { readonly column: RotorColumn; readonly message: string }[];
}

/** Reads what a person typed by the very rules of a row of the file (contract section 2). */
export function rotorFromTexts(texts: RotorTexts, unit: InertiaUnit): RotorReading {
  const log = new ProblemLog();
  const header = {
    line: 0,
    positions: new Map(ROTOR_COLUMNS.map((column, index) => [column, index])),
    own: [],
    names: ROTOR_COLUMNS,
    width: ROTOR_COLUMNS.length,
  };
  const cells = new Cells(header, log, { decimalComma: false, fieldLength: ROTOR_LIMITS.fieldLength });
  const fields = ROTOR_COLUMNS.map((column) => texts[column] ?? '');
  const rotor = cells.load({ line: 1, fields, misplacedQuote: null })
    ? readRotor(cells, FACTORS[unit])
    : null;
  const problems = log.problems().map(({ column, message }) => ({
    column: ROTOR_COLUMNS.find((one) => one === column) ?? 'rotor',
    message,
  }));
  return { rotor: problems.length > 0 ? null : rotor, problems };
}

/** A stored rotor as a person would type it in that unit: what was typed comes back as it was. */
export function textsOfRotor(rotor: Rotor, unit: InertiaUnit): RotorTexts {
  const { axis } = rotor;
  const number = (value: number | null): string => (value === null ? '' : String(value));
  const inertia = (value: number | null): string => number(value === null ? null : asTyped(value, unit));
  return {
    rotor: rotor.rotor,
    polar_inertia: inertia(rotor.polarInertia),
    ...(axis.kind === 'arrow'
      ? { axis_x: String(axis.x), axis_y: String(axis.y), axis_z: String(axis.z), sense: axis.hand }
      : {
          axis_yaw: String(degreesAsTyped(axis.yaw)),
          axis_pitch: String(degreesAsTyped(axis.pitch)),
          sense: axis.sense,
        }),
    gear_ratio: String(rotor.gearRatio),
    shaft: rotor.shaft === rotor.rotor ? '' : rotor.shaft,
    component: rotor.component ?? '',
    blades: number(rotor.blades),
    polar_inertia_sigma: inertia(rotor.polarInertiaSigma),
    group: rotor.group ?? '',
    note: rotor.note ?? '',
  };
}

/** `after` with the stored values of `before` where a person left the text of them as it was: rounding for show changes nothing. */
export function keepUntyped(before: Rotor, after: Rotor, unit: InertiaUnit): Rotor {
  const same = (a: number | null, b: number | null): boolean =>
    a === b || (a !== null && b !== null && asTyped(a, unit) === asTyped(b, unit));
  const sameAngle = (a: number, b: number): boolean => degreesAsTyped(a) === degreesAsTyped(b);
  const [one, other] = [before.axis, after.axis];
  const axis =
    one.kind === 'angles' && other.kind === 'angles'
      ? {
          ...other,
          yaw: sameAngle(one.yaw, other.yaw) ? one.yaw : other.yaw,
          pitch: sameAngle(one.pitch, other.pitch) ? one.pitch : other.pitch,
        }
      : other;
  return {
    ...after,
    axis,
    polarInertia: same(before.polarInertia, after.polarInertia) ? before.polarInertia : after.polarInertia,
    polarInertiaSigma: same(before.polarInertiaSigma, after.polarInertiaSigma)
      ? before.polarInertiaSigma
      : after.polarInertiaSigma,
  };
}
