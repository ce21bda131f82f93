import { AppError } from '@/lib/errors';
import { problemResponse } from './problem';

const METHODS = ['DELETE', 'GET', 'PATCH', 'POST', 'PUT'] as const;
type Method = (typeof METHODS)[number];

/**
 * Handlers for every method that a path does not have: a problem with `Allow` (RFC 9110 section 15.5.6), where the framework would
 * answer with nothing. A path that has GET has HEAD, and OPTIONS is the framework's.
 */
export function otherMethods<Own extends Method>(...own: readonly Own[]) {
  const allowed = [...own, ...(own.some((method) => method === 'GET') ? ['HEAD'] : []), 'OPTIONS'].join(', ');
  const refuse = (request: Request): Promise<Response> => {
    const error = new AppError(
      'method-not-allowed',
      `${new URL(request.url).pathname} has no ${request.method}. It has ${allowed}.`,
    );
    return Promise.resolve(problemResponse({ error, id: null }, { Allow: allowed }));
  };
  const rest = METHODS.filter((method) => !own.some((one) => one === method));
  return Object.fromEntries(rest.map((method) => [method, refuse])) as Record<
    Exclude<Method, Own>,
    typeof refuse
  >;
}
