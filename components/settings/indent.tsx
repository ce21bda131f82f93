/** Room before the name of a group for every level above it. */
export function Indent({ path }: { readonly path: string }) {
  return Array.from({ length: path.split('/').length - 1 }, (_, level) => (
    <span key={level} aria-hidden="true" className="inline-block w-4" />
  ));
}
