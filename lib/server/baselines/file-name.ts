import { type UnitSystem } from '@/lib/units/names';
import { type SignedBaseline } from './reach-baseline';

/** Names a file so that one of a baseline that is no longer current, or in US units, is known by it. */
export function fileName(
  program: string,
  { number, state }: Pick<SignedBaseline, 'number' | 'state'>,
  units: UnitSystem,
  ending: 'json' | 'csv',
): string {
  const said = [...(state === 'current' ? [] : [state]), ...(units === 'si' ? [] : [units])];
  return `${[program, 'baseline', number, ...said].join('-')}.${ending}`;
}
