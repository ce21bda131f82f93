import { pathsUp } from '@/lib/mass/allowances';

/** How the group paths that some rows state are read. */
export interface GroupReading {
  /** The path that a stated one has. */
  readonly present: (path: string) => string;
  /** The paths, as rows state them, that are in a group or below it. */
  readonly statedIn: (group: string) => readonly string[];
}

/** Reads the paths that rows state by a breakdown. */
export function groupReading(breakdown: GroupBreakdown, stated: Iterable<string>): GroupReading {
  const paths = [...new Set(stated)];
  return {
    present: (path) => breakdown.present(path),
    statedIn: (group) => paths.filter((path) => breakdown.isIn(path, group)),
  };
}

export const GROUP_CHANGE_KINDS = ['added', 'moved', 'recoded', 'removed'] as const;
export type GroupChangeKind = (typeof GROUP_CHANGE_KINDS)[number];

/** One thing done to a breakdown. A rename is a move that keeps what is above. `code` is of `added` and `recoded`. */
export interface GroupChange {
  readonly kind: GroupChangeKind;
  readonly path: string;
  /** Of `moved`: the path it has from then on, and what is below it with it. */
  readonly to: string | null;
  readonly code: string | null;
}

export interface GroupNode {
  readonly path: string;
  readonly code: string | null;
}

/** Rows that state no group are in this one; it needs no place in a tree. */
export const UNGROUPED = 'Ungrouped';

/** A breakdown of groups as everything done to it left it. A program that has none yet has no unknown groups. */
export class GroupBreakdown {
  readonly #codes = new Map<string, string | null>();
  readonly #moves: readonly { readonly from: string; readonly to: string }[];

  /** In the order in which it was done. */
  constructor(changes: readonly GroupChange[]) {
    for (const change of changes) this.#take(change);
    this.#moves = changes.flatMap(({ kind, path, to }) =>
      kind === 'moved' && to !== null ? [{ from: path, to }] : [],
    );
  }

  #take({ kind, path, to, code }: GroupChange): void {
    if (kind === 'added' || kind === 'recoded') this.#codes.set(path, code);
    if (kind === 'removed') this.#codes.delete(path);
    if (kind === 'moved' && to !== null) {
      const moved = [...this.#codes].filter(([one]) => isWithin(one, path));
      for (const [one] of moved) this.#codes.delete(one);
      for (const [one, own] of moved) this.#codes.set(movedPath(one, path, to), own);
    }
  }

  /** Whether anything was ever renamed or moved. */
  get hasMoves(): boolean {
    return this.#moves.length > 0;
  }

  get isEmpty(): boolean {
    return this.#codes.size === 0;
  }

  /** Level by level, by code where there is one and then by name, what is below a group after it. */
  nodes(): GroupNode[] {
    const key = new Map(
      [...this.#codes.keys()].map(
        (path) =>
          [
            path,
            pathsUp(path)
              .reverse()
              .map((one) => ({ code: this.codeOf(one), name: groupName(one) })),
          ] as const,
      ),
    );
    return [...this.#codes]
      .map(([path, code]) => ({ path, code }))
      .sort((a, b) => compareLevels(key.get(a.path) ?? [], key.get(b.path) ?? []));
  }

  has(path: string): boolean {
    return this.#codes.has(path);
  }

  codeOf(path: string): string | null {
    return this.#codes.get(path) ?? null;
  }

  /**
   * The path that a stored one has today: every rename and move since the first, in order, applied to it. Groups below a moved one
   * go with it, those too that the tree does not have.
   */
  present(path: string): string {
    return this.#moves.reduce(
      (now, { from, to }) => (isWithin(now, from) ? movedPath(now, from, to) : now),
      path,
    );
  }

  /** Whether today's tree lacks the path of a row; a path that has since been renamed is known by its new name. */
  isUnknown(path: string): boolean {
    return !this.isEmpty && path !== UNGROUPED && !this.has(this.present(path));
  }

  /** Whether a path that rows hold belongs, as of today, to `group` or what is below it; '' is the whole tree. */
  isIn(path: string, group: string): boolean {
    return group === '' || isWithin(this.present(path), group);
  }
}

/** Whether a path is `above` itself or below it. */
export function isWithin(path: string, above: string): boolean {
  return path === above || path.startsWith(`${above}/`);
}

/** `path`, which is within `from`, as it reads once `from` has become `to`. */
export function movedPath(path: string, from: string, to: string): string {
  return `${to}${path.slice(from.length)}`;
}

/** The path of the group above, '' for a top group. */
export function groupAbove(path: string): string {
  return path.split('/').slice(0, -1).join('/');
}

export function groupName(path: string): string {
  return path.split('/').at(-1) ?? path;
}

/** The path of a group called `name` below `above`; `above` '' makes it a top group. */
export function joinedPath(above: string, name: string): string {
  return above === '' ? name : `${above}/${name}`;
}

interface Level {
  readonly code: string | null;
  readonly name: string;
}

function compareLevels(a: readonly Level[], b: readonly Level[]): number {
  for (let level = 0; level < Math.min(a.length, b.length); level += 1) {
    const [left, right] = [a[level], b[level]];
    const order = left && right ? compareLevel(left, right) : 0;
    if (order !== 0) return order;
  }
  return a.length - b.length;
}

/** Those with a code first; 10.2 stands before 10.10. */
function compareLevel(a: Level, b: Level): number {
  if (a.code !== null && b.code !== null) {
    const order = compareCodes(a.code, b.code);
    if (order !== 0) return order;
  } else if (a.code !== b.code) return a.code === null ? 1 : -1;
  return a.name < b.name ? -1 : a.name > b.name ? 1 : 0;
}

/** Runs of digits by their number, all else by its letters. */
function compareCodes(a: string, b: string): number {
  const [p, q] = [runsOf(a), runsOf(b)];
  for (let at = 0; at < Math.min(p.length, q.length); at += 1) {
    const [left = '', right = ''] = [p[at], q[at]];
    if (left === right) continue;
    const [m, n] = [Number(left), Number(right)];
    if (m !== n && !Number.isNaN(m) && !Number.isNaN(n)) return m - n;
    return left < right ? -1 : 1;
  }
  return p.length - q.length;
}

const runsOf = (code: string): readonly string[] => code.match(/\d+|\D+/g) ?? [];
