/** A date, with `time` to the minute. In UTC, which it says, so that colleagues in other places read the same. */
export function Day({ at, time = false }: { readonly at: Date; readonly time?: boolean }) {
  const iso = at.toISOString();
  return (
    <time dateTime={iso} className="num whitespace-nowrap">
      {time ? `${iso.slice(0, 10)} ${iso.slice(11, 16)} UTC` : iso.slice(0, 10)}
    </time>
  );
}
