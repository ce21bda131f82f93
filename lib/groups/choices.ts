import { pathsUp } from '@/lib/mass/allowances';

import { type GroupBreakdown } from './breakdown';

/** Every group of the tree, then those that only rows have, each with the ones above it; by the names of today. */
export function groupChoices(breakdown: GroupBreakdown, paths: readonly string[]): string[] {
  const tree = breakdown.nodes().map(({ path }) => path);
  const others = new Set(paths.flatMap((path) => pathsUp(breakdown.present(path))));
  return [...tree, ...[...others].filter((path) => !breakdown.has(path)).sort()];
}
