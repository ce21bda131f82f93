import { fromSi } from '@/lib/units/convert';
import { OUTPUT_UNITS, type OutputUnits, type UnitSystem } from '@/lib/units/names';

type Kind = keyof OutputUnits;

/** Members whose numbers, however deep, have a unit; `in` narrows to a member of that name above it. Everything else has none. */
const MEMBERS: readonly { readonly name: string; readonly in?: string; readonly kind: Kind }[] = [
  { name: 'mass', kind: 'mass' },
  { name: 'predictedMass', kind: 'mass' },
  { name: 'fuel', kind: 'mass' },
  { name: 'airframe', kind: 'length' },
  { name: 'cg', in: 'sigma', kind: 'length' },
  { name: 'radiiOfGyration', kind: 'length' },
  { name: 'inertia', kind: 'inertia' },
  { name: 'moments', in: 'principal', kind: 'inertia' },
  { name: 'angularMomentum', kind: 'angularMomentum' },
  { name: 'gyroMatrix', kind: 'angularMomentum' },
  { name: 'hx', kind: 'angularMomentum' },
  { name: 'hy', kind: 'angularMomentum' },
  { name: 'hz', kind: 'angularMomentum' },
];

/** SI units that an object may name in its member `unit`. */
const NAMED_UNITS: ReadonlyMap<string, Kind> = new Map([
  ['kg', 'mass'],
  ['m', 'length'],
  ['kg.m2', 'inertia'],
]);

/**
 * A document of the API in another system of units: every number with a unit converted once, `units` saying which. SI is the
 * document itself.
 */
export function inUnits<T>(document: T, system: UnitSystem): T {
  return system === 'si' ? document : (converted(document, OUTPUT_UNITS[system], [], null) as T);
}

function converted(value: unknown, units: OutputUnits, path: readonly string[], kind: Kind | null): unknown {
  if (typeof value === 'number') return kind === null ? value : fromSi(value, units[kind]);
  if (Array.isArray(value)) return value.map((one) => converted(one, units, path, kind));
  if (typeof value !== 'object' || value === null) return value;
  const named = 'unit' in value && typeof value.unit === 'string' ? NAMED_UNITS.get(value.unit) : undefined;
  if (named !== undefined) return inNamedUnit(value, units, named);
  return Object.fromEntries(
    Object.entries(value).map(([name, member]) => [
      name,
      name === 'units' ? { ...units } : converted(member, units, [...path, name], kind ?? kindOf(name, path)),
    ]),
  );
}

/** A limit names its own unit: its `value` and the figures of its `standings` are in it. */
function inNamedUnit(value: object, units: OutputUnits, kind: Kind): unknown {
  const scaled = (member: unknown): unknown =>
    typeof member === 'number' ? fromSi(member, units[kind]) : member;
  return Object.fromEntries(
    Object.entries(value).map(([name, member]): [string, unknown] => {
      if (name === 'unit') return [name, units[kind]];
      if (name === 'value') return [name, scaled(member)];
      if (name !== 'standings' || !Array.isArray(member)) return [name, member];
      return [
        name,
        member.map((one: object) =>
          Object.fromEntries(Object.entries(one).map(([each, figure]) => [each, scaled(figure)])),
        ),
      ];
    }),
  );
}

function kindOf(name: string, path: readonly string[]): Kind | null {
  const found = MEMBERS.find(
    (member) => member.name === name && (member.in === undefined || path.includes(member.in)),
  );
  return found?.kind ?? null;
}
