type Fields = Readonly<Record<string, string | number | null | undefined>>;

/** A path with a query of those fields that say something. */
export function pathWith(path: string, fields: Fields): string {
  const query = new URLSearchParams(
    Object.entries(fields).flatMap(([name, value]) =>
      value === null || value === undefined || value === '' ? [] : [[name, String(value)]],
    ),
  ).toString();
  return query === '' ? path : `${path}?${query}`;
}

/** The later side of a comparison: a signed baseline, or a submission. */
export type LaterSide = { readonly to: number } | { readonly submission: string };

/** The rows behind a change. `home` is where the baselines of the program are. */
export function rowsPath(
  home: string,
  from: number | null,
  later: LaterSide,
  narrowed: { readonly list?: string; readonly group?: string; readonly page?: number } = {},
): string {
  return pathWith(`${home}/rows`, { from, ...later, ...narrowed });
}

export function accountPath(
  home: string,
  from: number,
  to: number,
  rest: { readonly condition?: string; readonly quantity?: string; readonly within?: string } = {},
): string {
  return pathWith(`${home}/account`, { from, to, ...rest });
}
