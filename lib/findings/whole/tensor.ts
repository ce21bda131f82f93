import { type MassResult } from '@/lib/mass/result';
import { type Physicality, checkSecondMoment } from '@/lib/mass/physical';
import { halfTraceMinus } from '@/lib/numerics/sym3';

import { type Sighting, type WholeRule } from '../rule';
import { shown } from '../watch';

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
    return [`${name}: least principal second moment ${shown(check.least)} kg.m2`];
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
