import { type MassResult } from '@/lib/mass/result';
import { type Physicality, checkSecondMoment } from '@/lib/mass/physical';
import { halfTraceMinus } from '@/lib/numerics/sym3';

import { ROWS_NAMED } from '../finding';
import { bothUnits } from '../both-units';
import { type Sighting, type WholeRule } from '../rule';
import { counted } from '../watch';

const SOURCE =
  'First principles: what remains of a body after removals is a body (positive semidefinite S; Wensing, Kim and Slotine 2018)';

function look(
  verdict: Physicality,
  { basic, predicted }: { basic: MassResult; predicted: MassResult },
): Sighting | null {
  const parts = [
    { name: 'basic', result: basic },
    { name: 'predicted', result: predicted },
  ].flatMap(({ name, result }) => {
    if (result.properties === null) return [];
    const check = checkSecondMoment(halfTraceMinus(result.properties.tensor));
    if (check.verdict !== verdict) return [];
    return [`${name}: least principal second moment ${bothUnits(check.least, 'kg.m2')}`];
  });
  if (parts.length === 0) return null;
  const headline =
    verdict === 'impossible'
      ? 'The total is not a body that can be'
      : 'The total is possible only within rounding';
  return { message: `${headline}. ${parts.join('; ')}.`, rows: [], count: 1 };
}

export const impossibleTotal: WholeRule = {
  id: 'impossible-total',
  severity: 'blocker',
  sees: 'A condition whose rolled-up tensor no body can have.',
  why: 'Something taken away is larger than what was there: the wrong baseline, place or sign of a removal, or a row that is itself impossible.',
  remedy: 'Look at the findings on rows first, then at the adjustments: each must match the rows it removes.',
  source: SOURCE,
  look: (whole) => look('impossible', whole),
};

export const totalWithinRounding: WholeRule = {
  id: 'total-within-rounding',
  severity: 'note',
  sees: 'A condition whose rolled-up tensor is short of possible by at most 1e-6 of its second moments.',
  why: 'All mass lies in one plane or on one line, up to rounding. An aircraft does not.',
  remedy: 'Check that the list is complete and its coordinates are not all in one plane.',
  source: SOURCE,
  look: (whole) => look('within-rounding', whole),
};

export const impossibleGroup: WholeRule = {
  id: 'impossible-group',
  severity: 'warning',
  sees: 'A group with mass whose tensor no body can have.',
  why: 'A removal took more from this group, or from another place, than there was: the part stands in another group, or the figures of the removal are not those of the part.',
  remedy: 'Compare each removal with the row that it removes: group, place, mass and moments.',
  source: SOURCE,
  look: ({ groups }) => {
    const found = groups.flatMap(({ group, basic: { properties } }) => {
      if (properties === null) return [];
      const { verdict, least } = checkSecondMoment(halfTraceMinus(properties.tensor));
      return verdict === 'impossible' ? [{ group, least }] : [];
    });
    const [first] = found;
    if (first === undefined) return null;
    const headline = counted(
      found.length,
      'group is not a body that can be',
      'groups are not bodies that can be',
    );
    return {
      message: `${headline}. First, ${first.group}: least principal second moment ${bothUnits(first.least, 'kg.m2')}.`,
      rows: found.slice(0, ROWS_NAMED).map(({ group }) => group),
      count: found.length,
    };
  },
};
