import { type ProgramLimits } from '@/components/configurations/condition-result';

interface StoredLimit {
  readonly quantity: 'cg-forward-percent-mac' | 'cg-aft-percent-mac' | 'mass-maximum';
  readonly kind: string;
  readonly value: number;
  readonly source: string;
}

/** The program's limits as a condition is judged by them. */
export function programLimits(limits: readonly StoredLimit[]): ProgramLimits {
  const limitOf = (quantity: StoredLimit['quantity']) => limits.find((limit) => limit.quantity === quantity);
  const mass = limitOf('mass-maximum');
  return {
    forward: limitOf('cg-forward-percent-mac')?.value ?? null,
    aft: limitOf('cg-aft-percent-mac')?.value ?? null,
    mass: mass === undefined ? null : { value: mass.value, kind: mass.kind, source: mass.source },
  };
}
