import { type CgLimits } from '@/components/baselines/condition-sheet';

type Limit = { readonly quantity: string; readonly value: number };

/** The CG limits among a program's limits, % MAC. */
export function cgLimits(limits: readonly Limit[]): CgLimits {
  return {
    forward: limitOf(limits, 'cg-forward-percent-mac'),
    aft: limitOf(limits, 'cg-aft-percent-mac'),
  };
}

/** kg */
export function massLimit(limits: readonly Limit[]): number | null {
  return limitOf(limits, 'mass-maximum');
}

function limitOf(limits: readonly Limit[], quantity: string): number | null {
  return limits.find((limit) => limit.quantity === quantity)?.value ?? null;
}
