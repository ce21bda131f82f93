import { type GrowthAllowances } from '@/lib/mass/roll-up';
import { MATURITIES } from '@/lib/mass/component';

interface Inputs {
  readonly version: number;
  readonly allowances: GrowthAllowances;
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
  return changed;
}
