import { allowanceFor } from '@/lib/mass/allowances';
import { CATEGORIES } from '@/lib/mass/component';
import { type GrowthAllowances, type OnBoardItem, type RollUpOptions } from '@/lib/mass/roll-up';

import { type UncertaintySubtotal } from './book';
import { type AccountUncertainty, UncertaintySum } from './sums';

export interface CombinedUncertainty {
  readonly basic: AccountUncertainty;
  readonly predicted: AccountUncertainty;
}

/**
 * The uncertainty of what `rollUp` adds up from the same lists, items and options. Items on board state no σ: they add only to the
 * mass of which none is known. For one group, give the parts of that group.
 */
export function combineUncertainty(
  parts: Iterable<UncertaintySubtotal>,
  items: Iterable<Pick<OnBoardItem, 'mass'>>,
  allowances: GrowthAllowances,
  options: RollUpOptions = {},
): CombinedUncertainty {
  const { statuses = ['approved'], categories = CATEGORIES } = options;
  const [basic, predicted] = [new UncertaintySum(), new UncertaintySum()];
  // What grows alike is added up before it grows: there are few allowances and many parts.
  const growing = new Map<number, UncertaintySum>();
  for (const part of parts) {
    if (!statuses.includes(part.status) || !categories.includes(part.category)) continue;
    basic.add(part.basic);
    // Σ |m| of no rows.
    if (part.statedPredicted.mass !== 0) predicted.add(part.statedPredicted);
    const { fraction } = allowanceFor(allowances, part.group, part.maturity);
    const alike = growing.get(fraction) ?? new UncertaintySum();
    growing.set(fraction, alike);
    alike.add(part.unstatedBasic);
  }
  for (const [fraction, alike] of growing) predicted.add(alike.uncertainty, 1 + fraction);
  for (const { mass } of items) {
    basic.addWithoutSigma(mass);
    predicted.addWithoutSigma(mass);
  }
  return { basic: basic.uncertainty, predicted: predicted.uncertainty };
}
