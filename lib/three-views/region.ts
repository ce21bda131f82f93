import { type AirframeVec } from '@/lib/frames/tags';
import { type Range } from './bounds';
import { type ViewAxes } from './views';

/** A box in airframe coordinates from the datum, m; a coordinate without a range is free. */
export type Region = readonly [Range | null, Range | null, Range | null];

export const EVERYWHERE: Region = [null, null, null];

export const isEverywhere = (region: Region): boolean => region.every((range) => range === null);

/** Its faces belong to it. */
export function holds(region: Region, place: AirframeVec): boolean {
  return region.every((range, k) => {
    const at = place[k] ?? NaN;
    return range === null || (at >= range[0] && at <= range[1]);
  });
}

/**
 * The region between two corners on a sheet (m). Within `kept`: it keeps that one's range along the line of sight, and of its other
 * ranges what both share, or the drawn one where they share nothing.
 */
export function regionBetween(
  [u1, v1]: readonly [number, number],
  [u2, v2]: readonly [number, number],
  { across, upward }: ViewAxes,
  kept: Region = EVERYWHERE,
): Region {
  const range = (a: number, b: number): Range => {
    // To the millimetre: what a hand draws means no more, and the address stays short.
    const [p, q] = [Math.round(a * 1000) / 1000 + 0, Math.round(b * 1000) / 1000 + 0];
    return p < q ? [p, q] : [q, p];
  };
  const along = (k: 0 | 1 | 2): Range | null => {
    if (k === across.index) return shared(range(across.sign * u1, across.sign * u2), kept[k]);
    return k === upward.index ? shared(range(upward.sign * v1, upward.sign * v2), kept[k]) : kept[k];
  };
  return [along(0), along(1), along(2)];
}

function shared(drawn: Range, kept: Range | null): Range {
  if (kept === null) return drawn;
  const [low, high] = [Math.max(drawn[0], kept[0]), Math.min(drawn[1], kept[1])];
  return low <= high ? [low, high] : drawn;
}

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** `2.5..4`, `2.5..` or `..4` as a range in either order of its ends; null when it says nothing that can be read. */
export function rangeOf(text: string | null): Range | null {
  const [low, high, ...rest] = (text ?? '').split('..').map((part) => part.trim());
  if (low === undefined || high === undefined || rest.length > 0 || low + high === '') return null;
  if (![low, high].every((part) => part === '' || NUMBER.test(part))) return null;
  const from = low === '' ? -Infinity : Number(low);
  const to = high === '' ? Infinity : Number(high);
  return from <= to ? [from, to] : [to, from];
}

export function rangeText(range: Range | null): string | null {
  if (range === null) return null;
  const text = range.map((end) => (Number.isFinite(end) ? String(end) : '')).join('..');
  return text === '..' ? null : text;
}
