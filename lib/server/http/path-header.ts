/** Set by proxy.ts on every page request: path and query, so that sign-in can lead back. */
export const PATH_HEADER = 'x-polhode-path';
