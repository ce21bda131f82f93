import { type GroupChange, GroupBreakdown, groupAbove, isWithin, movedPath } from './breakdown';

/**
 * Why a change cannot be made to a breakdown, in a sentence; null when it can. A path that was the former name of another group
 * stays with that group for good: rows of old revisions say it, and would otherwise change their place unseen.
 */
export function groupProblem(done: readonly GroupChange[], change: GroupChange): string | null {
  const tree = new GroupBreakdown(done);
  const { kind, path, to, code } = change;
  if (kind !== 'added' && !tree.has(path)) return `There is no group ${path} any more. Load the page again.`;
  if (kind === 'added') {
    if (tree.has(path)) return `There is a group ${path} already.`;
    const above = groupAbove(path);
    if (above !== '' && !tree.has(above)) return `There is no group ${above} to put it in.`;
    return formerName(tree, path) ?? codeProblem(tree, path, code);
  }
  if (kind === 'recoded') return codeProblem(tree, path, code);
  if (kind === 'removed') {
    const below = tree.nodes().find((node) => node.path !== path && isWithin(node.path, path));
    return below ? `Move or remove what is below it first: ${below.path}.` : null;
  }
  if (to === null) return 'Say where it moves to.';
  if (to === path) return 'That is where it is already.';
  if (isWithin(to, path)) return 'A group cannot move below itself.';
  if (tree.has(to)) return `There is a group ${to} already. Two groups do not become one by a move.`;
  const above = groupAbove(to);
  if (above !== '' && !tree.has(above)) return `There is no group ${above} to put it in.`;
  const after = new GroupBreakdown([...done, change]);
  const moved = tree.nodes().filter((node) => isWithin(node.path, path));
  for (const node of moved) {
    const problem = formerName(after, movedPath(node.path, path, to));
    if (problem) return problem;
  }
  return null;
}

function formerName(tree: GroupBreakdown, path: string): string | null {
  const now = tree.present(path);
  return now === path
    ? null
    : `${path} is a former name of ${now}: rows of earlier revisions are in that group by it. Choose another name.`;
}

function codeProblem(tree: GroupBreakdown, path: string, code: string | null): string | null {
  const other =
    code === null ? undefined : tree.nodes().find((node) => node.code === code && node.path !== path);
  return other ? `${other.path} has the code ${code ?? ''} already.` : null;
}
