import { shaftsWithoutSpeed } from '@/lib/rotors/momentum';

import { ROWS_NAMED } from '../finding';
import { type RotorRule } from '../rule';
import { counted } from '../watch';

export const twoBlades: RotorRule = {
  id: 'two-bladed-rotor',
  severity: 'note',
  sees: 'A rotor with two blades.',
  why: 'It is not axisymmetric: seen from the airframe its tensor turns with it. Its mean transverse inertia is used, which leaves out a moment at twice the rotor speed.',
  remedy: 'Nothing needs doing for rigid-body simulation; say so where vibration matters.',
  source:
    'First principles: a rotor of three or more equal blades has equal transverse moments, one of two has not',
  look: ({ rotors }) => {
    const found = rotors.filter(({ blades }) => blades === 2).map(({ rotor }) => rotor);
    const [first] = found;
    if (first === undefined) return null;
    return {
      message: `${counted(found.length, 'rotor has', 'rotors have')} two blades and so no equal transverse inertias: the mean is used. First, ${first}.`,
      rows: found.slice(0, ROWS_NAMED),
      count: found.length,
    };
  },
};

export const shaftWithoutSpeed: RotorRule = {
  id: 'shaft-without-speed',
  severity: 'blocker',
  sees: 'An operating point that states no speed for a shaft that a rotor hangs on.',
  why: 'The angular momentum of that point cannot be told.',
  remedy: 'Give the speed of every shaft at every operating point; 0 for one that stands still.',
  source: 'First principles',
  look: ({ rotors, points }) => {
    const missing = points.flatMap((point) =>
      shaftsWithoutSpeed(rotors, point).map((shaft) => ({ point: point.code, shaft })),
    );
    const [first] = missing;
    if (first === undefined) return null;
    const shafts = new Set(missing.map(({ shaft }) => shaft));
    const concerned = rotors.filter(({ shaft }) => shafts.has(shaft)).map(({ rotor }) => rotor);
    return {
      message: `${counted(missing.length, 'shaft speed is', 'shaft speeds are')} missing. First, ${first.shaft} at ${first.point}.`,
      rows: concerned.slice(0, ROWS_NAMED),
      count: missing.length,
    };
  },
};

export const neverTurns: RotorRule = {
  id: 'rotor-never-turns',
  severity: 'warning',
  sees: 'A rotor whose speed is zero at every operating point.',
  why: 'It adds no angular momentum anywhere: its speeds are missing, or stand at another shaft.',
  remedy: 'Give the speeds of its shaft, or take the rotor out.',
  source: 'Common practice, no source',
  look: ({ rotors, points }) => {
    const turning = new Set(
      points.flatMap(({ speeds }) => speeds.filter(({ speed }) => speed !== 0).map(({ shaft }) => shaft)),
    );
    const stated = new Set(points.flatMap(({ speeds }) => speeds.map(({ shaft }) => shaft)));
    const found = rotors.filter(({ shaft }) => stated.has(shaft) && !turning.has(shaft));
    const [first] = found;
    if (first === undefined) return null;
    return {
      message: `${counted(found.length, 'rotor stands still', 'rotors stand still')} at every operating point. First, ${first.rotor}, shaft ${first.shaft}.`,
      rows: found.slice(0, ROWS_NAMED).map(({ rotor }) => rotor),
      count: found.length,
    };
  },
};
