import { degrees } from '@/lib/units/convert';

/** An inclination (rad, nose-up positive) in degrees, its sign in words. */
export function inclinationWords(angle: number): string {
  const value = degrees(angle);
  const size = Math.abs(value).toFixed(4);
  if (Number(size) === 0) return `${size} degrees`;
  return `${size} degrees, ${value > 0 ? 'nose up' : 'nose down'}`;
}
