import { airframeToBody, toBody } from '@/lib/frames/body';
import { type BodyVec } from '@/lib/frames/tags';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { degreesAsTyped } from '@/lib/units/convert';

import { spinArrow } from './axis';
import { type SpinAxis } from './rotor';

/** The axis as its file gives it, in words. */
export function axisAsGiven(axis: SpinAxis): string {
  if (axis.kind === 'arrow')
    return `Arrow ${axis.x}, ${axis.y}, ${axis.z}; ${axis.hand === 'rh' ? 'right' : 'left'} hand`;
  const side = turned(axis.yaw, 'right', 'left');
  const height = turned(axis.pitch, 'up', 'down');
  const straight = [side, height].filter((part) => part !== null).join(', ') || 'straight';
  return `Forward, ${straight}; ${axis.sense === 'cw' ? 'clockwise' : 'counter-clockwise'}`;
}

function turned(angle: number, positive: string, negative: string): string | null {
  if (angle === 0) return null;
  return `${Math.abs(degreesAsTyped(angle))}° ${angle > 0 ? positive : negative}`;
}

/** The unit arrow in body axes about which a positive speed turns by the right-hand rule. */
export function bodySpin(axis: SpinAxis, geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>): BodyVec {
  return toBody(airframeToBody(geometry.axes, geometry.incidence), spinArrow(axis, geometry.axes));
}

/** Where one stands to see the turn, by the body axis that the shaft is nearest to; looking along + that axis. */
const SEEN_FROM = ['behind', 'the left', 'above'] as const;

/**
 * The sense of a positive speed as a person would see it. A turn about an arrow that points away from the eye is clockwise, by the
 * right-hand rule.
 */
export function senseInWords(spin: BodyVec): string {
  const sizes = spin.map(Math.abs);
  const nearest = sizes.indexOf(Math.max(...sizes));
  const away = (spin[nearest] ?? 0) > 0;
  return `${away ? 'Clockwise' : 'Counter-clockwise'} seen from ${SEEN_FROM[nearest] ?? 'behind'}`;
}
