import { type Moments } from '@/lib/frames/products';
import { type ConditionChange } from './compare';

export interface InertiaChange {
  readonly element: keyof Moments;
  /** kg.m2, of the moment or the positive product. */
  readonly delta: number;
}

/** The moment or product that changed most, in kg.m2; null where one side has no tensor or nothing changed. */
export function largestInertiaChange({ inertia }: Pick<ConditionChange, 'inertia'>): InertiaChange | null {
  const elements = Object.keys(inertia) as (keyof Moments)[];
  const changes = elements.flatMap((element) => {
    const { delta } = inertia[element];
    return delta === null || delta === 0 ? [] : [{ element, delta }];
  });
  return changes.reduce<InertiaChange | null>(
    (most, change) => (most === null || Math.abs(change.delta) > Math.abs(most.delta) ? change : most),
    null,
  );
}
