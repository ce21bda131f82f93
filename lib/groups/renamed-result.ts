import { type ConfigurationResult } from '@/lib/loading/configuration';
import { renamedGroups } from '@/lib/mass/roll-up';

import { type GroupBreakdown } from './breakdown';

/**
 * A stored result with its groups by the names that a later result gives them, so that the two can be compared group by group. `since`
 * holds what was done to the breakdown between the two.
 */
export function renamedResult(result: ConfigurationResult, since: GroupBreakdown): ConfigurationResult {
  if (!since.hasMoves) return result;
  return {
    ...result,
    conditions: result.conditions.map((condition) => ({
      ...condition,
      rollUp: {
        ...condition.rollUp,
        groups: renamedGroups(condition.rollUp.groups, result.geometry, (group) => since.present(group)),
      },
    })),
  };
}
