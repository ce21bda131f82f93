import { type ProgramAction, type SiteAction } from '@/lib/permissions';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { type SignedIn } from '@/lib/server/auth/session';
import { serverDb } from '@/lib/server/database';
import { env } from '@/lib/server/env';
import { type ProgramAccess, requireProgramAction, requireSiteAction } from './access';
import { requireDeclaredSize, requireOwnOrigin } from './guards';
import { currentAddress, currentUser } from './page';
import { failureOf, problemResponse } from './problem';
import { JSON_BYTES } from './read-json';

type Params = Record<string, string>;
type Handler<P> = (request: Request, context: { params: Promise<P> }) => Promise<Response>;

export interface RouteCall<P> {
  readonly request: Request;
  readonly params: P;
  readonly user: SignedIn;
  readonly person: Person;
}

interface RouteOptions {
  /** Of the request's body; 1 MiB unless said. */
  readonly maxBytes?: number;
}

/** A route handler for our own pages that concerns no program: session, Origin, permission and declared size come first. */
export function siteRoute<P extends Params = Params>(
  action: SiteAction,
  handler: (call: RouteCall<P>) => Promise<Response>,
  options: RouteOptions = {},
): Handler<P> {
  return guarded(options, async (call) => {
    requireSiteAction(call.user, action);
    return () => handler(call);
  });
}

/** The same for one program, named by its code in the path's `[program]`. */
export function programRoute<P extends Params & { program: string }>(
  action: ProgramAction,
  handler: (call: RouteCall<P> & ProgramAccess) => Promise<Response>,
  options: RouteOptions = {},
): Handler<P> {
  return guarded<P>(options, async (call) => {
    const access = await requireProgramAction(serverDb(), call.user, { code: call.params.program }, action);
    return () => handler({ ...call, ...access });
  });
}

function guarded<P extends Params>(
  { maxBytes = JSON_BYTES }: RouteOptions,
  admit: (call: RouteCall<P>) => Promise<() => Promise<Response>>,
): Handler<P> {
  return async (request, context) => {
    try {
      requireOwnOrigin(request.method, request.headers, env().APP_URL);
      const user = await currentUser();
      if (!user) throw new AppError('not-signed-in', 'Your session has ended. Sign in again.');
      const person = { userId: user.id, address: await currentAddress() };
      const handle = await admit({ request, params: await context.params, user, person });
      requireDeclaredSize(request.method, request.headers, maxBytes);
      const response = await handle();
      if (!response.headers.has('Cache-Control')) response.headers.set('Cache-Control', 'private, no-store');
      return response;
    } catch (thrown) {
      return problemResponse(failureOf(thrown, `${request.method} ${new URL(request.url).pathname}`));
    }
  };
}
