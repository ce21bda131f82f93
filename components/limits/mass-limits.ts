import { type Limit } from '@/lib/loading/limits';

/** The limits of the mass of the whole aircraft in a condition. */
export function massLimitsOf(limits: readonly Limit[], condition: string | null): Limit[] {
  return limits.filter(
    (limit) =>
      limit.quantity === 'mass' &&
      limit.group === '' &&
      (limit.condition === null || limit.condition === condition),
  );
}
