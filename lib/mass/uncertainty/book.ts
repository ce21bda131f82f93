import { type Component } from '@/lib/mass/component';
import { type Placement, piecesOf } from '@/lib/mass/place';
import { type SubtotalKey } from '@/lib/mass/subtotals';

import { effectsOf } from './row-effects';
import { type AccountUncertainty, UncertaintySum, covarianceOf } from './sums';

/**
 * The uncertainty of a `Subtotal`, part by part and under the same key: of its basic account, and of the two from which the predicted
 * one is made. A predicted row is its row times 1 + growth, errors and all; the growth itself is taken as certain.
 */
export interface UncertaintySubtotal extends SubtotalKey {
  readonly basic: AccountUncertainty;
  readonly statedPredicted: AccountUncertainty;
  readonly unstatedBasic: AccountUncertainty;
}

interface Entry {
  readonly key: SubtotalKey;
  readonly basic: UncertaintySum;
  readonly statedPredicted: UncertaintySum;
  readonly unstatedBasic: UncertaintySum;
}

/** Books the uncertainty of the rows of a list one at a time, beside a `SubtotalBook` and with the same placement. */
export class UncertaintyBook {
  readonly #entries = new Map<string, Entry>();

  constructor(readonly placement: Placement) {}

  add(component: Component): void {
    const entry = this.#entry(component);
    if (component.counting === 'memo') return;
    const { basic, statedPredicted, unstatedBasic } = entry;
    const [sum, factor] =
      component.growth === null ? [unstatedBasic, 1] : [statedPredicted, 1 + component.growth];
    const mass = Math.abs(component.mass) * piecesOf(component, this.placement.declarations);
    const effects = effectsOf(component, this.placement);
    if (component.sigma === null) {
      basic.addWithoutSigma(mass);
      sum.addWithoutSigma(factor * mass);
      return;
    }
    const massWithSigma = component.sigma.mass === null ? 0 : mass;
    const uncertainty = { mass, massWithSigma, covariance: covarianceOf(effects) };
    basic.add(uncertainty);
    sum.add(uncertainty, factor);
  }

  /** One per key, in the order in which the keys first came: the order of `SubtotalBook.subtotals`. */
  sums(): UncertaintySubtotal[] {
    return [...this.#entries.values()].map(({ key, basic, statedPredicted, unstatedBasic }) => ({
      ...key,
      basic: basic.uncertainty,
      statedPredicted: statedPredicted.uncertainty,
      unstatedBasic: unstatedBasic.uncertainty,
    }));
  }

  #entry({ group, category, maturity, status }: SubtotalKey): Entry {
    const id = JSON.stringify([group, category, maturity, status]);
    const known = this.#entries.get(id);
    if (known) return known;
    const entry: Entry = {
      key: { group, category, maturity, status },
      basic: new UncertaintySum(),
      statedPredicted: new UncertaintySum(),
      unstatedBasic: new UncertaintySum(),
    };
    this.#entries.set(id, entry);
    return entry;
  }
}
