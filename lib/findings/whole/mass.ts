import { ROWS_NAMED } from '../finding';
import { bothUnits } from '../both-units';
import { type WholeRule } from '../rule';
import { counted } from '../watch';

export const massNotPositive: WholeRule = {
  id: 'mass-not-positive',
  severity: 'blocker',
  sees: 'A condition whose mass is zero or less, basic or predicted.',
  why: 'It has no CG and no tensor: nothing can be signed or handed off.',
  remedy: 'Check which lists and items are on board, and the signs of the adjustments.',
  source: 'First principles',
  look: ({ basic, predicted }) => {
    const least = Math.min(basic.mass, predicted.mass);
    if (least > 0) return null;
    return {
      message: `The mass is ${bothUnits(least, 'kg')}: there is no CG and no tensor.`,
      rows: [],
      count: 1,
    };
  },
};

export const groupWithoutMass: WholeRule = {
  id: 'group-without-mass',
  severity: 'note',
  sees: 'A group whose mass is zero or less.',
  why: 'Groups that only take away are ordinary; such a group shows mass and moment, and no CG.',
  remedy: 'Nothing needs doing where the group holds removals.',
  source: 'Common practice, no source',
  look: ({ groups }) => {
    const found = groups.filter(({ rows, basic }) => rows > 0 && basic.mass <= 0);
    const [first] = found;
    if (first === undefined) return null;
    const headline = counted(found.length, 'group has no positive mass', 'groups have no positive mass');
    return {
      message: `${headline} and so no CG. First, ${first.group}: ${bothUnits(first.basic.mass, 'kg')}.`,
      rows: found.slice(0, ROWS_NAMED).map(({ group }) => group),
      count: found.length,
    };
  },
};

export const growthUnknown: WholeRule = {
  id: 'growth-unknown',
  severity: 'note',
  sees: 'Mass without a growth allowance: rows that state none, whose maturity has none or is not stated.',
  why: 'Its predicted mass equals its basic mass.',
  remedy: 'State growth_percent or the maturity of the rows, or set the allowances of the program.',
  source: 'Common practice, no source',
  look: ({ ungrownMass, basic }) =>
    ungrownMass === 0
      ? null
      : {
          message: `${bothUnits(ungrownMass, 'kg')} of ${bothUnits(basic.mass, 'kg')} has no growth allowance and is predicted as it is.`,
          rows: [],
          count: 1,
        },
};
