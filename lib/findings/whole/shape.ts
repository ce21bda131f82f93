import { type AirframeGeometry } from '@/lib/mass/geometry';

import { bothUnits } from '../both-units';
import { type WholeRule } from '../rule';
import { shown } from '../watch';

/** True where span and length are known, so that a condition can be judged as an aircraft and not as any set of parts. */
export function isAircraft({ span, length }: AirframeGeometry): boolean {
  return span > 0 && length > 0;
}

const PUBLISHED =
  'Published aircraft from NASA CR-96008, CR-2144, TM-85890, TM-2015-218675 and GTM_DesignSim: 1.020 to 1.227; common practice for the limits';

export const izzNotLargest: WholeRule = {
  id: 'izz-not-largest',
  severity: 'warning',
  sees: 'A condition of an aircraft with a span whose Izz is not its largest moment.',
  why: 'An aeroplane is flat: what lies ahead and behind and what lies to the sides both count in Izz. A smaller Izz is two figures exchanged or from two sources.',
  remedy: 'Check the order and the sources of the moments of the heaviest rows.',
  source:
    'First principles: Izz - Iyy = ∫(y² - z²) dm; published aeroplanes have Izz largest, a helicopter may not',
  look: ({ basic: { properties } }, geometry) => {
    if (properties === null || !isAircraft(geometry)) return null;
    const { ixx, iyy, izz } = properties.inertia;
    if (izz >= Math.max(ixx, iyy)) return null;
    const [name, larger] = iyy >= ixx ? ['Iyy', iyy] : ['Ixx', ixx];
    return {
      message: `Izz is ${bothUnits(izz, 'kg.m2')}, ${name} ${bothUnits(larger, 'kg.m2')}: of an aeroplane Izz is the largest.`,
      rows: [],
      count: 1,
    };
  },
};

/** The band of (Ixx + Iyy)/Izz in which published aircraft are. */
const BAND = [1.02, 1.25] as const;
/** Published figures reach the lower end, 1.0201, so that it is not to be cut by rounding. */
const ROUNDED = 0.002;

export const flatness: WholeRule = {
  id: 'flatness-outside-band',
  severity: 'warning',
  sees: 'A condition of an aircraft with Izz largest and (Ixx + Iyy)/Izz outside 1.02 to 1.25.',
  why: 'The excess over 1 is twice the height of the mass over its plan form. Below the band something is flatter than aircraft are; above it, Izz lacks what Ixx and Iyy hold, or one of them is too large.',
  remedy: 'Check the unit and the source of the moments of the heaviest rows, and their vertical places.',
  source: PUBLISHED,
  look: ({ basic: { properties } }, geometry) => {
    if (properties === null || !isAircraft(geometry)) return null;
    const { ixx, iyy, izz } = properties.inertia;
    const ratio = (ixx + iyy) / izz;
    // Below 1 no body can be: another rule stops it.
    if (izz < Math.max(ixx, iyy) || ratio < 1) return null;
    if (ratio >= BAND[0] - ROUNDED && ratio <= BAND[1]) return null;
    return {
      message: `(Ixx + Iyy)/Izz is ${shown(ratio)}; published aircraft have ${BAND[0]} to ${BAND[1]}.`,
      rows: [],
      count: 1,
    };
  },
};
