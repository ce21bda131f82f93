import { type Mat3, multiply } from './mat3';

/**
 * [cos, sin] of an angle in rad, exact at quarter turns: a shaft turned by 90 degrees must not pick up products of inertia
 * from π/2 not being a double.
 */
function cosSin(angle: number): readonly [number, number] {
  const quarters = angle / (Math.PI / 2);
  const whole = Math.round(quarters);
  if (Math.abs(quarters - whole) > 4 * Number.EPSILON * Math.max(1, Math.abs(whole)))
    return [Math.cos(angle), Math.sin(angle)];
  switch (((whole % 4) + 4) % 4) {
    case 0:
      return [1, 0];
    case 1:
      return [0, 1];
    case 2:
      return [-1, 0];
    default:
      return [0, -1];
  }
}

export function rotationX(angle: number): Mat3 {
  const [c, s] = cosSin(angle);
  return [
    [1, 0, 0],
    [0, c, -s],
    [0, s, c],
  ];
}

export function rotationY(angle: number): Mat3 {
  const [c, s] = cosSin(angle);
  return [
    [c, 0, s],
    [0, 1, 0],
    [-s, 0, c],
  ];
}

export function rotationZ(angle: number): Mat3 {
  const [c, s] = cosSin(angle);
  return [
    [c, -s, 0],
    [s, c, 0],
    [0, 0, 1],
  ];
}

/** Rz(yaw) Ry(pitch) Rx(roll), angles in rad: its columns are the turned axes in the components of the axes turned from. */
export function rotation(yaw: number, pitch: number, roll: number): Mat3 {
  return multiply(rotationZ(yaw), multiply(rotationY(pitch), rotationX(roll)));
}

/** Below this cosine of the pitch, yaw and roll turn about one axis and only their sum or difference is known. */
const LOCKED = 1e-12;

/**
 * Yaw, pitch, roll (rad) whose `rotation` is m, a proper rotation; |pitch| <= 90 degrees. Where the pitch is 90 degrees the yaw is
 * given as 0 and the roll holds all of the turn.
 */
export function anglesOf(m: Mat3): { readonly yaw: number; readonly pitch: number; readonly roll: number } {
  const level = Math.hypot(m[0][0], m[1][0]);
  const pitch = Math.atan2(0 - m[2][0], level);
  if (level < LOCKED) return { yaw: 0, pitch, roll: Math.atan2(0 - m[1][2], m[1][1]) };
  return { yaw: Math.atan2(m[1][0], m[0][0]), pitch, roll: Math.atan2(m[2][1], m[2][2]) };
}
