import { type CgLimits } from '@/components/baselines/condition-sheet';
import { type Limit, tightest } from '@/lib/loading/limits';

/** The CG limits of the whole aircraft in a condition, % MAC, the tightest on each side. */
export function cgLimits(limits: readonly Limit[], condition: string | null): CgLimits {
  const { least, most } = tightest(limits, 'percentMac', condition);
  return { forward: least?.value ?? null, aft: most?.value ?? null };
}
