import { type Maturity } from './component';
import { type GrowthAllowances } from './roll-up';

/** An allowance that a group states for a maturity; a fraction of mass. */
export interface GroupAllowance {
  readonly group: string;
  readonly maturity: Maturity;
  readonly fraction: number;
}

export interface AppliedAllowance {
  readonly fraction: number;
  /** The group path whose rule gave it; '' for the program's own, null where no maturity is stated. */
  readonly from: string | null;
}

/**
 * The growth allowance of rows that state none: that of the nearest group up their path that states one for their maturity, then
 * the program's own. Without a maturity there is none.
 */
export function allowanceFor(
  allowances: GrowthAllowances,
  group: string,
  maturity: Maturity | null,
): AppliedAllowance {
  if (maturity === null) return { fraction: 0, from: null };
  const stated = (allowances.groups ?? []).filter((rule) => rule.maturity === maturity);
  if (stated.length > 0)
    for (const path of pathsUp(group)) {
      const rule = stated.find((one) => one.group === path);
      if (rule) return { fraction: rule.fraction, from: path };
    }
  return { fraction: allowances[maturity], from: '' };
}

/** A group path and every path above it, the longest first. */
export function pathsUp(group: string): string[] {
  const levels = group.split('/');
  return levels.map((_, above) => levels.slice(0, levels.length - above).join('/'));
}
