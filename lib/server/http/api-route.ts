import { type ProgramAction } from '@/lib/permissions';
import { type AppError } from '@/lib/errors';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { RATE_POLICIES, type RatePolicy } from '@/lib/server/rate-limit/policies';
import { rateHeaders, take, tooMany } from '@/lib/server/rate-limit/take';
import { type TokenScope } from '@/lib/token-scopes';
import { type ProgramAccess } from './access';
import { clientAddress } from './client-address';
import { requireDeclaredSize } from './guards';
import { failureOf, problemResponse } from './problem';
import { JSON_BYTES } from './read-json';
import { callerOf, reachProgram, requireScope, type TokenCaller } from './token-caller';

type Params = Record<string, string>;
type Handler<P> = (request: Request, context: { params: Promise<P> }) => Promise<Response>;

export interface ApiCall<P> {
  readonly request: Request;
  readonly params: P;
  readonly caller: TokenCaller;
}

interface ApiNeeds {
  /** `any`: every valid token will do. */
  readonly scope: TokenScope | 'any';
  readonly limit?: RatePolicy;
  /** Of the request's body; 1 MiB unless said. */
  readonly maxBytes?: number;
}

type ProgramNeeds = ApiNeeds & { readonly scope: TokenScope; readonly action: ProgramAction };

/** A route of the JSON API: bearer tokens only, cookies are not looked at. Rate limit, scope and declared size come first. */
export function apiRoute<P extends Params = Params>(
  needs: ApiNeeds,
  handler: (call: ApiCall<P>) => Promise<Response>,
): Handler<P> {
  return metered<P>(needs, async (call) => {
    if (needs.scope !== 'any') requireScope(call.caller, needs.scope);
    return () => handler(call);
  });
}

/** The same for one program, named by its code in the path's `[program]`; the owner's role there is asked at every call. */
export function apiProgramRoute<P extends Params & { program: string }>(
  needs: ProgramNeeds,
  handler: (call: ApiCall<P> & ProgramAccess) => Promise<Response>,
): Handler<P> {
  return metered<P>(needs, async (call) => {
    const access = await reachProgram(serverDb(), call.caller, { code: call.params.program }, needs);
    return () => handler({ ...call, ...access });
  });
}

/** A route that needs no token. Errors are answered as problems all the same. */
export function openRoute<P extends Params = Params>(
  handler: (call: { readonly request: Request; readonly params: P }) => Promise<Response>,
): Handler<P> {
  return async (request, context) => {
    try {
      return await handler({ request, params: await context.params });
    } catch (thrown) {
      return problemResponse(failureOf(thrown, where(request)));
    }
  };
}

function metered<P extends Params>(
  { limit = RATE_POLICIES.api, maxBytes = JSON_BYTES }: ApiNeeds,
  admit: (call: ApiCall<P>) => Promise<() => Promise<Response>>,
): Handler<P> {
  return async (request, context) => {
    let headers: Record<string, string> = {};
    try {
      const address = clientAddress(request.headers, env().TRUSTED_PROXIES);
      const caller = await callerOf(serverDb(), request.headers, address);
      const rate = await take(serverDb(), limit, caller.id);
      headers = rateHeaders(rate);
      if (!rate.allowed) throw tooMany(rate);
      const handle = await admit({ request, params: await context.params, caller });
      requireDeclaredSize(request.method, request.headers, maxBytes);
      const response = await handle();
      if (!response.headers.has('Cache-Control')) response.headers.set('Cache-Control', 'private, no-store');
      for (const [name, value] of Object.entries(headers)) response.headers.set(name, value);
      return response;
    } catch (thrown) {
      const failure = failureOf(thrown, where(request));
      return problemResponse(failure, { ...headers, ...challenge(failure.error) });
    }
  };
}

const where = (request: Request): string => `${request.method} ${new URL(request.url).pathname}`;

/** RFC 6750 section 3. */
function challenge(error: AppError): Record<string, string> {
  if (error.code === 'invalid-token')
    return { 'WWW-Authenticate': 'Bearer realm="polhode", error="invalid_token"' };
  if (error.code === 'insufficient-scope') {
    return { 'WWW-Authenticate': 'Bearer realm="polhode", error="insufficient_scope"' };
  }
  return {};
}
