import { type ProblemLog } from '@/lib/ingest/problem-log';

interface Child {
  readonly line: number;
  readonly parent: string;
}

/** The items of a list and who belongs to whom: a few words of memory a row, whatever the row holds. */
export class ItemTree {
  private readonly lines = new Map<string, number>();
  private readonly children = new Map<string, Child>();

  constructor(private readonly log: ProblemLog) {}

  /** Notes a row; false when its item stands in an earlier line. */
  add(item: string, parent: string | null, line: number, column: string): boolean {
    const earlier = this.lines.get(item);
    if (earlier !== undefined) {
      const message = `The ${column} stands already in line ${earlier}. Give every row one of its own.`;
      this.log.add({ kind: `duplicate-${column}`, line, column, found: item, message });
      return false;
    }
    const key = detached(item);
    this.lines.set(key, line);
    if (parent !== null) this.children.set(key, { line, parent: detached(parent) });
    return true;
  }

  /** Logs parents that are not in the list, and circles. To be called after the last row. */
  finish(): void {
    const settled = new Set<string>();
    for (const [item, { line, parent }] of this.children) {
      if (!this.lines.has(parent)) {
        const message = `No row has the item \`${parent}\`. Write the item of the assembly this row belongs to.`;
        this.log.add({ kind: 'unknown-parent', line, column: 'parent', found: parent, message });
      } else if (this.closesCircle(item, settled)) {
        const message = `\`${item}\` is its own parent, by way of \`${parent}\`. Break the circle.`;
        this.log.add({ kind: 'parent-circle', line, column: 'parent', found: parent, message });
      }
    }
  }

  private closesCircle(item: string, settled: Set<string>): boolean {
    const path = new Set<string>();
    let at: string | undefined = item;
    while (at !== undefined && !settled.has(at) && !path.has(at)) {
      path.add(at);
      at = this.children.get(at)?.parent;
    }
    for (const seen of path) settled.add(seen);
    return at !== undefined && path.has(at);
  }
}

/** A copy that does not keep the block of the file alive which it was cut from. */
function detached(text: string): string {
  return ` ${text}`.slice(1);
}
