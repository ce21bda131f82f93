import { type Deviation } from '@/components/mass/two-tensors';
import { type Principal } from '@/lib/mass/principal';
import { principalSigma } from '@/lib/mass/uncertainty/derived';
import { type PropertiesUncertainty } from '@/lib/mass/uncertainty/uncertainty-of';

/** One standard deviation of a tensor and of its principal moments; null where none is stated. */
export function tensorDeviation(
  of: { readonly principal: Pick<Principal, 'axes'> } | null,
  sigma: PropertiesUncertainty | null,
): Deviation | null {
  if (of === null || sigma === null) return null;
  return { inertia: sigma.inertia, principal: principalSigma(of.principal, sigma.covariance) };
}
