import { type Vec3, normVec } from '@/lib/numerics/vec3';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';

import { type RowChange, type RowFigures } from '../context';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { slipAt, slipWords, slipsOfOneThing } from '../unit-slips';
import { FIRST_ROWS, Seen, counted, inUnit } from '../watch';

/*
 * Rows against themselves in the revision before. The caller shows the changed rows, and may leave out those that changed by too little
 * for any factor of a unit and whose coordinates kept their signs.
 */

/** Two figures for one row agree with a factor of the table within this share. */
const AT_FACTOR = 0.005;
/** Moments are compared where the masses are the same within this share. */
const SAME_MASS = 0.02;
/** A coordinate smaller than this, m, may change its sign. */
const NEAR_ZERO = 0.05;

const AXES = [0, 1, 2] as const;
const NAMES = ['x', 'y', 'z'] as const;

const sumOf = ({ moments: { ixx, iyy, izz } }: RowFigures): number => ixx + iyy + izz;

function watchChanges(
  judgeOf: (list: WatchedList) => (change: RowChange) => string | null,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return (list) => {
    const seen = new Seen();
    const judge = judgeOf(list);
    return {
      see: () => undefined,
      block: () => undefined,
      change: (change) => {
        const what = judge(change);
        if (what !== null) seen.add(change.item, what);
      },
      report: () => seen.report(headline),
    };
  };
}

const FACTORS = 'NIST SP 811 (2008), appendix B, for the factors';

export const changedByMassUnit: RowRule = {
  id: 'mass-changed-by-unit',
  severity: 'warning',
  sees: 'A counted row whose mass against its revision before is, within 0.5 %, off by the factor of a mass unit (lb to kg, g to kg, slug to lb ...).',
  why: 'Parts seldom change by just such a factor: the figure was probably entered in another unit than the list declares.',
  remedy: 'Check the mass against its source and put it into the unit that the list declares.',
  source: FACTORS,
  keeps: FIRST_ROWS,
  watch: watchChanges(
    ({ placement: { declarations } }) => {
      const { massUnit } = declarations;
      const slips = slipsOfOneThing(massUnit, MASS_UNITS);
      return ({ now, before }) => {
        if (before.mass === 0) return null;
        const slip = slipAt(now.mass / before.mass, slips, AT_FACTOR);
        return slip === null
          ? null
          : `${inUnit(now.mass, massUnit)}, before ${inUnit(before.mass, massUnit)}: it looks ${slipWords(slip)}`;
      };
    },
    (count) =>
      counted(
        count,
        'row changed its mass by the factor of a unit',
        'rows changed their mass by the factor of a unit',
      ),
  ),
};

type Axis = (typeof AXES)[number];

/** The one coordinate whose sign turned while all kept their size; null where the place changed otherwise. */
function turnedAxis(now: Vec3, before: Vec3): Axis | null {
  const [turned, ...more] = AXES.filter((k) => now[k] * before[k] < 0);
  if (turned === undefined || more.length > 0 || Math.abs(now[turned]) < NEAR_ZERO) return null;
  const most = AT_FACTOR * normVec(before);
  return AXES.every((k) => Math.abs(Math.abs(now[k]) - Math.abs(before[k])) <= most) ? turned : null;
}

function isLateral(axis: Axis, { placement: { declarations } }: WatchedList): boolean {
  return ['left', 'right'].includes(declarations.axes[axis]);
}

/** `it looks as if in mm`, or which coordinate has the other sign; null where the place changed otherwise. */
function slipOfPlace({ now, before }: RowChange, list: WatchedList): string | null {
  const was = normVec(before.position);
  if (was === 0) return null;
  const slips = slipsOfOneThing(list.placement.declarations.lengthUnit, LENGTH_UNITS);
  const slip = slipAt(normVec(now.position) / was, slips, AT_FACTOR);
  if (slip !== null) {
    const { factor } = slip;
    const isScaled = AXES.every(
      (k) => Math.abs(now.position[k] - factor * before.position[k]) <= AT_FACTOR * factor * was,
    );
    return isScaled ? `it looks ${slipWords(slip)}` : null;
  }
  const turned = turnedAxis(now.position, before.position);
  return turned === null || isLateral(turned, list) ? null : `${NAMES[turned]} has the other sign`;
}

/** `CG 5, 1.5, 0.8 m, before 5, -1.5, 0.8 m`. */
function bothPlaces({ now, before }: RowChange, { placement }: WatchedList): string {
  const { lengthUnit } = placement.declarations;
  const at = (place: Vec3): string =>
    `${place.map((part) => inUnit(part, lengthUnit).split(' ')[0]).join(', ')} ${lengthUnit}`;
  return `CG ${at(now.position)}, before ${at(before.position)}`;
}

export const changedByLengthUnit: RowRule = {
  id: 'place-changed-by-slip',
  severity: 'warning',
  sees: 'A counted row whose place against its revision before is off by the factor of a length unit in all three coordinates (25.4, 12, 3.2808, 1000 ...), or has the other sign of one that is not lateral, within 0.5 %.',
  why: 'A part that moves goes somewhere near; a factor of a unit or a turned sign is a slip of the entry.',
  remedy: 'Check the place against its source: unit, sign and the axes that the list declares.',
  source: FACTORS,
  keeps: FIRST_ROWS,
  watch: watchChanges(
    (list) => (change) => {
      const words = slipOfPlace(change, list);
      return words === null ? null : `${bothPlaces(change, list)}: ${words}`;
    },
    (count) =>
      counted(
        count,
        'row moved by a unit or a sign since the revision before',
        'rows moved by a unit or a sign since the revision before',
      ),
  ),
};

export const movedAcross: RowRule = {
  id: 'moved-to-other-side',
  severity: 'note',
  sees: 'A counted row whose lateral coordinate has the other sign than in its revision before, all else being where it was within 0.5 %.',
  why: 'Parts do change sides; but a sign lost in a new source looks just the same, and moves the CG twice as far as the part is off the plane.',
  remedy: 'Check that the part was meant to change sides.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: watchChanges(
    (list) => (change) => {
      const turned = turnedAxis(change.now.position, change.before.position);
      return turned === null || !isLateral(turned, list) ? null : bothPlaces(change, list);
    },
    (count) => counted(count, 'row changed sides', 'rows changed sides'),
  ),
};

export const changedByInertiaUnit: RowRule = {
  id: 'inertia-changed-by-unit',
  severity: 'warning',
  sees: 'A counted row of the same mass whose moments against its revision before are, within 0.5 %, off by the factor of an inertia unit (32.174, 144, 12, 4633.06 ...).',
  why: 'A part of one mass does not change its inertia by just such a factor: the figures are probably in another unit than the list declares.',
  remedy: 'Check the moments against their source and put them into the unit that the list declares.',
  source: FACTORS,
  keeps: FIRST_ROWS,
  watch: watchChanges(
    ({ placement: { declarations } }) => {
      const { inertiaUnit } = declarations;
      const slips = slipsOfOneThing(inertiaUnit, INERTIA_UNITS, 1.2);
      return ({ now, before }) => {
        const [is, was] = [sumOf(now), sumOf(before)];
        if (was === 0 || before.mass === 0 || Math.abs(now.mass / before.mass - 1) > SAME_MASS) return null;
        const slip = slipAt(is / was, slips, AT_FACTOR);
        return slip === null
          ? null
          : `Ixx + Iyy + Izz ${inUnit(is, inertiaUnit)}, before ${inUnit(was, inertiaUnit)}: they look ${slipWords(slip)}`;
      };
    },
    (count) =>
      counted(
        count,
        'row changed its moments by the factor of a unit',
        'rows changed their moments by the factor of a unit',
      ),
  ),
};
