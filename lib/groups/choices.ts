import { pathsUp } from '@/lib/mass/allowances';

import { type GroupBreakdown } from './breakdown';

/** Every group of the tree, then those that only rows have, each with the ones above it; by the names of today. */
export function groupChoices(breakdown: GroupBreakdown, paths: readonly string[]): string[] {
  const tree = breakdown.nodes().map(({ path }) => path);
  const others = new Set(paths.flatMap((path) => pathsUp(breakdown.present(path))));
  return [...tree, ...[...others].filter((path) => !breakdown.has(path)).sort()];
}

/** What has to be added, groups above before those below, so that all of `wanted` are in the tree. */
export function pathsToAdd(breakdown: GroupBreakdown, wanted: readonly string[]): string[] {
  const needed = new Set(wanted.flatMap((path) => pathsUp(path)));
  return [...needed]
    .filter((path) => !breakdown.has(path))
    .sort((a, b) => a.split('/').length - b.split('/').length || (a < b ? -1 : 1));
}
