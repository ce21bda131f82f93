import { parseUnit, type UnitSystem } from './names';
import { LENGTH_UNITS, type LengthUnit, MASS_UNITS, type MassUnit } from './table';

/*
 * The units that an address asks for: `?length=in`, `?mass=lb` for forms, `?units=us` for results. What it does not ask for, or
 * asks for in words that are no unit, is SI.
 */

type Asked = string | readonly string[] | undefined;

const only = (asked: Asked): string => (typeof asked === 'string' ? asked : '');

export const askedLength = (asked: Asked): LengthUnit => parseUnit(only(asked), LENGTH_UNITS) ?? 'm';
export const askedMass = (asked: Asked): MassUnit => parseUnit(only(asked), MASS_UNITS) ?? 'kg';
export const askedSystem = (asked: Asked): UnitSystem => (asked === 'us' ? 'us' : 'si');
