import { type limitsOf } from '@/db/queries/settings';
import { type ProgramLimits } from '@/components/configurations/condition-result';

/** The program's limits as a condition is judged by them. */
export function limitsOnPage(limits: Awaited<ReturnType<typeof limitsOf>>): ProgramLimits {
  const valueOf = (quantity: string) => limits.find((limit) => limit.quantity === quantity);
  const mass = valueOf('mass-maximum');
  return {
    forward: valueOf('cg-forward-percent-mac')?.value ?? null,
    aft: valueOf('cg-aft-percent-mac')?.value ?? null,
    mass: mass === undefined ? null : { value: mass.value, kind: mass.kind, source: mass.source },
  };
}
