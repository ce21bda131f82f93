/** The one of a list whose code an address asks for; the first when it asks for none of them. */
export function chosen<T extends { readonly code: string }>(list: readonly T[], asked: unknown): T | null {
  return list.find((one) => one.code === asked) ?? list[0] ?? null;
}
