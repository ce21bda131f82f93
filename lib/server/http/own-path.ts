/** The path to lead on to after sign-in, `/` for anything that is not a path of ours. */
export function ownPath(next: string | undefined): string {
  if (next === undefined || !/^\/(?![/\\])/.test(next)) return '/';
  const base = 'http://here.invalid';
  const url = URL.canParse(next, base) ? new URL(next, base) : null;
  return url?.origin === base ? url.pathname + url.search : '/';
}
