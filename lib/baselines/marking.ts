/**
 * The marking of what is made from several marked lists: every different marking, since their texts have no order that a program
 * could know. Null where nothing is marked.
 */
export function combinedMarking(markings: readonly (string | null)[]): string | null {
  const different = [...new Set(markings.filter((marking) => marking !== null))].sort();
  return different.length === 0 ? null : different.join(' / ');
}
