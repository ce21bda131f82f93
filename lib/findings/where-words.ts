import { type PlacedFinding } from '@/lib/findings/finding';

/** Where a finding was seen, in words. */
export function whereWords(
  { kind, code, revision }: PlacedFinding['where'],
  titles: ReadonlyMap<string, string> = new Map(),
): string {
  if (kind === 'condition') return `Condition ${titles.get(code) ?? code}`;
  const of = kind === 'list' ? `List ${titles.get(code) ?? code}` : 'Rotating parts';
  return revision === undefined ? of : `${of}, revision ${revision}`;
}
