import { expect } from 'vitest';
import { fromSi } from '@/lib/units/convert';
import { type Unit } from '@/lib/units/table';

/** Written out by hand from the contract: where a document holds a number with a unit, as a path with * for any place in a list. */
const KINDS: readonly (readonly [pattern: RegExp, unit: Unit])[] = [
  [/^(conditions\.\*|condition)\.(mass|predictedMass|predicted\.mass|sigma\.mass)$/, 'lb'],
  [/^(conditions\.\*|condition)\.(predicted\.)?cg\.airframe\.[xyz]$/, 'in'],
  [/^(conditions\.\*|condition)\.sigma\.cg\.[xyz]$/, 'in'],
  [/^(conditions\.\*|condition)\.(predicted\.)?radiiOfGyration\.[xyz]$/, 'in'],
  [/^referencePoints\.\*\.airframe\.[xyz]$/, 'in'],
  [/^(conditions\.\*|condition)\.(predicted\.|sigma\.)?inertia\.(i[xyz][xyz]|tensor\.\*\.\*)$/, 'slug.ft2'],
  [/^(conditions\.\*|condition)\.(predicted\.)?principal\.moments\.\*$/, 'slug.ft2'],
  [/^(operatingPoints\.\*\.)?(angularMomentum\.|sigma\.|rotors\.\*\.)h[xyz]$/, 'slug.ft2/s'],
  [/^(operatingPoints\.\*\.)?gyroMatrix\.\*\.\*$/, 'slug.ft2/s'],
];
const US_UNITS = { mass: 'lb', length: 'in', inertia: 'slug.ft2', angularMomentum: 'slug.ft2/s' };

function* leaves(value: unknown, path: string, place: string): Generator<readonly [string, string, unknown]> {
  if (typeof value !== 'object' || value === null) {
    yield [path, place, value];
    return;
  }
  for (const [name, member] of Object.entries(value)) {
    const step = Array.isArray(value) ? '*' : name;
    yield* leaves(member, path === '' ? step : `${path}.${step}`, `${place}/${name}`);
  }
}

/** Fails unless every number with a unit is converted once and everything else is the same; all of the paths in `KINDS` count. */
export function expectConverted(si: object, us: object, { all = true } = {}): void {
  const byPlace = (found: readonly (readonly unknown[])[]) =>
    found.toSorted(([, a], [, b]) => (String(a) < String(b) ? -1 : 1));
  const used = new Set<RegExp>();
  const expected = [...leaves(si, '', '')].map(([path, place, value]) => {
    const kind = KINDS.find(([pattern]) => pattern.test(path));
    if (path.startsWith('conventions.units.'))
      return [path, place, US_UNITS[path.slice('conventions.units.'.length) as keyof typeof US_UNITS]];
    if (kind === undefined || typeof value !== 'number') return [path, place, value];
    used.add(kind[0]);
    return [path, place, fromSi(value, kind[1])];
  });
  expect(byPlace([...leaves(us, '', '')])).toEqual(byPlace(expected));
  if (all) expect(KINDS.filter(([pattern]) => !used.has(pattern))).toEqual([]);
}
