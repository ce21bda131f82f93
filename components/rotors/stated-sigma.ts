import { type Momentum } from '@/components/mass/momentum-table';
import { type MomentumUncertainty } from '@/lib/rotors/uncertainty';

/** One standard deviation of an angular momentum; null where nothing states one: zero would read as certain. */
export function statedSigma(uncertainty: MomentumUncertainty | null): Momentum | null {
  if (uncertainty === null) return null;
  const [hx, hy, hz] = uncertainty.sigma;
  return hx === 0 && hy === 0 && hz === 0 ? null : { hx, hy, hz };
}
