import { USUAL_AXES } from '@/lib/frames/axes';
import { lateralIndex, mirrorPlace } from '@/lib/frames/reflection';
import { type Vec3, dotVec } from '@/lib/numerics/vec3';
import { spinArrow, spinAxisProblem } from '@/lib/rotors/axis';
import { degrees } from '@/lib/units/convert';

import { ROWS_NAMED } from '../finding';
import { type RotorRule } from '../rule';
import { counted, shown } from '../watch';

/** Sine of the angle to the plane of symmetry below which a shaft lies in it, and above which it stands across: 3 degrees. */
const IN_PLANE = 0.05;
const ACROSS = Math.sqrt(1 - IN_PLANE ** 2);
/** Shafts within 2.5 degrees, and polar inertias within 5 %, are alike. */
const SAME_LINE = 0.999;
const SAME_INERTIA = 0.05;

export const axisWithoutTwin: RotorRule = {
  id: 'shaft-without-twin',
  severity: 'note',
  sees: 'A rotor whose shaft is turned out of the plane of symmetry by more than 3 degrees (and does not stand across it), without a rotor of its inertia turned the other way.',
  why: 'Shafts are toed in or out in pairs. One alone is a wrong yaw sign on one side, or a twin that is missing.',
  remedy:
    'Check axis_yaw or axis_y of both sides; nothing needs doing for a single rotor that is so by design.',
  source: 'Common practice, no source',
  look: ({ rotors, geometry }) => {
    // Without the airframe an arrow points nowhere, and any rotor could be the twin.
    if (geometry === undefined && rotors.some(({ axis }) => axis.kind === 'arrow')) return null;
    const axes = geometry?.axes ?? USUAL_AXES;
    const lateral = lateralIndex(axes);
    const shafts = rotors
      .filter(({ axis }) => spinAxisProblem(axis) === null)
      .map(({ rotor, axis, polarInertia }) => ({ rotor, polarInertia, arrow: spinArrow(axis, axes) }));
    const found = shafts.filter((one) => {
      const across = Math.abs(one.arrow[lateral]);
      if (across <= IN_PLANE || across >= ACROSS) return false;
      const image: Vec3 = mirrorPlace(one.arrow, lateral, 0);
      return !shafts.some(
        (other) =>
          other !== one &&
          Math.abs(dotVec(other.arrow, image)) >= SAME_LINE &&
          Math.abs(other.polarInertia / one.polarInertia - 1) <= SAME_INERTIA,
      );
    });
    const [first] = found;
    if (first === undefined) return null;
    const angle = degrees(Math.asin(Math.min(1, Math.abs(first.arrow[lateral]))));
    return {
      message: `${counted(found.length, 'shaft is', 'shafts are')} turned out of the plane of symmetry without a twin on the other side. First, ${first.rotor}: ${shown(angle)} degrees.`,
      rows: found.slice(0, ROWS_NAMED).map(({ rotor }) => rotor),
      count: found.length,
    };
  },
};
