import { FACTORS, type Unit } from './table';

/** A value stated in `unit`, in SI (kg, m, kg.m2, kg.m2/s). */
export function toSi(value: number, unit: Unit): number {
  const { times, over } = FACTORS[unit];
  return (value * times) / over;
}

/** An SI value, stated in `unit`. */
export function fromSi(value: number, unit: Unit): number {
  const { times, over } = FACTORS[unit];
  return (value * over) / times;
}

/**
 * An SI value stated in `unit` as a person typed it: 15 significant digits drop the rounding of the way there and back, so that
 * 12.3 lb reads 12.3 again.
 */
export function asTyped(value: number, unit: Unit): number {
  return Number(fromSi(value, unit).toPrecision(15));
}

/** deg -> rad. */
export function radians(degrees: number): number {
  return (degrees * Math.PI) / 180;
}

/** rad -> deg. */
export function degrees(angle: number): number {
  return (angle * 180) / Math.PI;
}

/** rad -> deg with the digits a person typed, as `asTyped`. */
export function degreesAsTyped(angle: number): number {
  return Number(degrees(angle).toPrecision(15));
}

/** Revolutions per minute -> rad/s. */
export function radiansPerSecond(rpm: number): number {
  return (rpm * Math.PI) / 30;
}

/** rad/s -> revolutions per minute. */
export function rpm(speed: number): number {
  return (speed * 30) / Math.PI;
}

/** rad/s -> revolutions per minute with the digits a person typed, as `asTyped`. */
export function rpmAsTyped(speed: number): number {
  return Number(rpm(speed).toPrecision(15));
}
