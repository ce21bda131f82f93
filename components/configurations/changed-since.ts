import { type GrowthAllowances } from '@/lib/mass/roll-up';
import { type Limit } from '@/lib/loading/limits';
import { MATURITIES } from '@/lib/mass/component';

interface Inputs {
  readonly version: number;
  readonly allowances: GrowthAllowances;
  /** In force; absent where they were not kept. */
  readonly limits?: readonly Limit[] | undefined;
}

/** What has changed since a roll-up, each in words; none when it still says what the configuration is. */
export function changedSince(rolledUp: Inputs, now: Inputs): string[] {
  const changed: string[] = [];
  if (rolledUp.version !== now.version) {
    const times = now.version - rolledUp.version;
    changed.push(
      times === 1 ? 'The configuration was changed once.' : `The configuration was changed ${times} times.`,
    );
  }
  const grown = MATURITIES.filter((code) => rolledUp.allowances[code] !== now.allowances[code]);
  if (grown.length > 0)
    changed.push(`The program's growth allowance was changed for maturity ${grown.join(', ')}.`);
  if (text(rolledUp.allowances.groups) !== text(now.allowances.groups))
    changed.push('The growth allowance of a group was changed.');
  if (now.limits !== undefined && text(rolledUp.limits) !== text(now.limits))
    changed.push('The limits in force are others.');
  return changed;
}

/** As stored or as read anew, in whatever order: the same says the same. */
function text(list: readonly object[] | undefined): string {
  return (list ?? [])
    .map((one) => JSON.stringify(Object.entries(one).sort()))
    .sort()
    .join();
}
