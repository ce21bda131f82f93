import { type ProgramLimits } from '@/components/configurations/condition-result';
import { type Limit, tightest } from '@/lib/loading/limits';

/** The limits of the whole aircraft that a condition is drawn against: the tightest on each side. */
export function programLimits(limits: readonly Limit[], condition: string): ProgramLimits {
  const cg = tightest(limits, 'percentMac', condition);
  const mass = tightest(limits, 'mass', condition).most;
  return {
    forward: cg.least?.value ?? null,
    aft: cg.most?.value ?? null,
    mass: mass === null ? null : { value: mass.value, kind: mass.kind, source: mass.source },
  };
}
