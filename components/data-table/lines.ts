/** A line of the table's body: a row, the head of a group with the rows below it, or a row that is still on its way. */
export type Line<Row> =
  | { readonly kind: 'row'; readonly row: Row; readonly id: string }
  | { readonly kind: 'group'; readonly path: string; readonly rows: readonly Row[]; readonly id: string }
  | { readonly kind: 'waiting'; readonly id: string };

/** Rows as lines, in the order given. */
export function plainLines<Row>(rows: readonly Row[], idOf: (row: Row) => string): readonly Line<Row>[] {
  return rows.map((row) => ({ kind: 'row', row, id: idOf(row) }));
}

/** Rows under a line for each group. Groups are ordered by path; rows keep their order inside. */
export function groupedLines<Row>(
  rows: readonly Row[],
  idOf: (row: Row) => string,
  groupOf: (row: Row) => string,
): readonly Line<Row>[] {
  const groups = new Map<string, Row[]>();
  for (const row of rows) {
    const path = groupOf(row);
    const members = groups.get(path);
    if (members) members.push(row);
    else groups.set(path, [row]);
  }
  const ordered = [...groups].sort(([a], [b]) => byPath(a, b));
  return ordered.flatMap(([path, members]): Line<Row>[] => [
    { kind: 'group', path, rows: members, id: `group ${path}` },
    ...members.map((row): Line<Row> => ({ kind: 'row', row, id: idOf(row) })),
  ]);
}

/** Every group path that occurs, with the paths above it, in order. */
export function groupPaths(paths: Iterable<string>): readonly string[] {
  const all = new Set<string>();
  for (const path of new Set(paths)) {
    const parts = path.split('/');
    parts.forEach((_, index) => all.add(parts.slice(0, index + 1).join('/')));
  }
  return [...all].sort(byPath);
}

function byPath(a: string, b: string): number {
  return a.localeCompare(b, 'en', { numeric: true });
}
