import { INERTIA_UNITS, type InertiaUnit } from '@/lib/units/table';

import { TRAITS } from '../columns/traits';
import { type RowFacts } from '../row-facts';
import { type RowRule, type WatchedList } from '../rule';
import { unitSlips } from '../unit-slips';
import { FIRST_ROWS, counted, eachRow, inUnit, shown } from '../watch';

/** Half the larger of span and length, m; null where the airframe is not known. */
function halfSize({ geometry }: WatchedList): number | null {
  const size = Math.max(geometry?.span ?? 0, geometry?.length ?? 0);
  return size > 0 ? size / 2 : null;
}

/** The largest radius of gyration about a plane through the CG, m: the root of the largest diagonal of S over the mass. */
function largestReach({ component: { mass, moments } }: RowFacts): number {
  const { ixx, iyy, izz } = moments;
  const largest = Math.max(iyy + izz - ixx, ixx + izz - iyy, ixx + iyy - izz) / (2 * mass);
  return largest > 0 ? Math.sqrt(largest) : 0;
}

/** Parts range over this factor in size, from the aircraft down and from a ball of metal up. */
const LEAST_PART = 60;

/**
 * `; in lb.in2 they could be`: the inertia units, three at most, in which the figures would be smaller or larger by a factor
 * between `least` and `most`. Nothing where there are none, or so many that they say nothing.
 */
function inOtherUnits(declared: InertiaUnit, least: number, most: number): string {
  const factors = new Map(
    unitSlips(declared, INERTIA_UNITS)
      .filter(({ isTwice, factor }) => !isTwice && factor >= least && factor <= most)
      .map(({ unit, factor }) => [shown(factor), unit] as const),
  );
  const units = [...factors.values()];
  if (units.length === 0 || units.length > 3) return '';
  return `; in ${units.length === 1 ? '' : `${units.slice(0, -1).join(', ')} or `}${units.at(-1) ?? ''} they could be`;
}

export const largerThanAircraft: RowRule = {
  id: 'larger-than-aircraft',
  severity: 'blocker',
  sees: 'A counted row whose own moments need mass farther from its CG than half the aircraft’s span or length, whichever is larger.',
  why: 'No part of the aircraft is larger than the aircraft: the moments are in another unit, about another point than the CG, or the mass is wrong.',
  remedy:
    'Check the inertia unit that the list declares, that the moments are about the row’s own CG, the mass, and span and length of the frame issue.',
  source: 'First principles: ∫ξ² dm ≤ m (L/2)² for a body of extent L (Bhatia and Davis 2000)',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row, list) => {
      const half = halfSize(list);
      if (half === null || !row.isCounted || row.component.mass === 0) return null;
      const reach = largestReach(row);
      if (reach <= half) return null;
      const { lengthUnit, inertiaUnit } = row.declarations;
      const tooLarge = (reach / half) ** 2;
      return (
        `radius of gyration ${inUnit(reach, lengthUnit)}, half the aircraft ${inUnit(half, lengthUnit)}` +
        inOtherUnits(inertiaUnit, tooLarge, LEAST_PART ** 2 * tooLarge)
      );
    },
    (count) =>
      counted(
        count,
        'row has moments that no part of this aircraft can have',
        'rows have moments that no part of this aircraft can have',
      ),
    { traits: TRAITS.reach },
  ),
};

/** Density of osmium, the densest solid there is, kg/m3. CRC Handbook of Chemistry and Physics; the value is from memory, unverified. */
const DENSEST = 22_590;

/** The least tr S that a body of this mass can have, kg.m2: a solid ball of the densest metal, 3/5 m r². */
export function leastTrace(mass: number): number {
  return 0.6 * mass * ((3 * mass) / (4 * Math.PI * DENSEST)) ** (2 / 3);
}

export const denserThanMetal: RowRule = {
  id: 'denser-than-metal',
  severity: 'warning',
  sees: 'A counted row whose own moments are not zero and smaller than those of a solid ball of osmium of its mass.',
  why: 'Of all bodies of one mass and density a ball has the least inertia, and nothing is denser. The moments are in a smaller unit than declared, or a place holder.',
  remedy: 'Check the inertia unit that the list declares and the mass; give the moments from the drawing.',
  source:
    'First principles: tr S ≥ 3/5 m r² with m = 4/3 π ρ r³; density of osmium 22 590 kg/m3 from memory, unverified',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => {
      const { mass, moments } = row.component;
      if (!row.isCounted || mass === 0 || !row.hasOwnMoments) return null;
      const trace = Math.abs(moments.ixx + moments.iyy + moments.izz) / 2;
      const least = leastTrace(Math.abs(mass));
      // Printed digits excuse what they can, in each of the three moments; asking for them is the dearer question.
      if (trace >= least || trace + 3 * row.rounding >= least) return null;
      const { massUnit, inertiaUnit } = row.declarations;
      const tooSmall = trace / least;
      return (
        `${inUnit(mass, massUnit)}, Ixx + Iyy + Izz ${inUnit(2 * trace, inertiaUnit)}, a ball of osmium has ` +
        `${shown(1 / tooSmall)} times as much${inOtherUnits(inertiaUnit, tooSmall / LEAST_PART ** 2, tooSmall)}`
      );
    },
    (count) =>
      counted(
        count,
        'row has moments smaller than a ball of the densest metal',
        'rows have moments smaller than a ball of the densest metal',
      ),
    { traits: TRAITS.dense },
  ),
};

/** Moments that are at least this share of m r² about every axis, and at most `MOST_TRANSFER` of it in sum, are those of a transfer. */
export const LEAST_TRANSFER = 0.95;
export const MOST_TRANSFER = 1.2;

export const momentsAboutDatum: RowRule = {
  id: 'moments-about-datum',
  severity: 'warning',
  sees: 'A counted row whose own moments hold the whole transfer term m r² to the list’s datum.',
  why: 'They were probably stated about the datum. Here moments are about the row’s own CG, and the transfer would be counted twice.',
  remedy: 'Subtract the transfer from the CG to the datum and state the moments about the row’s own CG.',
  source: 'First principles: J about the datum = J about the CG + m (r² 1 - r rᵀ)',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => {
      const { mass, moments, position, orientation } = row.component;
      const { yaw, pitch, roll } = orientation;
      if (!row.isCounted || mass === 0 || !row.hasOwnMoments) return null;
      if (yaw !== 0 || pitch !== 0 || roll !== 0) return null;
      const [x, y, z] = position;
      const square = x * x + y * y + z * z;
      const { ixx, iyy, izz } = moments;
      const diagonal = [iyy + izz - ixx, ixx + izz - iyy, ixx + iyy - izz].map((twice) => twice / (2 * mass));
      const sum = diagonal.reduce((total, each) => total + each, 0);
      if (square === 0 || sum < LEAST_TRANSFER * square || sum > MOST_TRANSFER * square) return null;
      const holds = [x, y, z].every((along, k) => (diagonal[k] ?? NaN) >= LEAST_TRANSFER * along * along);
      if (!holds) return null;
      const { lengthUnit } = row.declarations;
      return (
        `radius of gyration ${inUnit(Math.sqrt(sum), lengthUnit)}, ` +
        `CG ${inUnit(Math.sqrt(square), lengthUnit)} from the datum`
      );
    },
    (count) =>
      counted(
        count,
        'row states moments that look taken about the datum',
        'rows state moments that look taken about the datum',
      ),
    { traits: TRAITS.transfer },
  ),
};
