import { randomBytes } from 'node:crypto';
import { type NextRequest, NextResponse } from 'next/server';
import { PATH_HEADER } from '@/lib/server/http/path-header';

const DEV = process.env.NODE_ENV === 'development';
const HTTPS = process.env['APP_URL']?.startsWith('https:') === true;

/** Scripts run by nonce only. The development server needs eval, and styles without a nonce for its reloads. */
function contentSecurityPolicy(nonce: string): string {
  return [
    `default-src 'self'`,
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${DEV ? " 'unsafe-eval'" : ''}`,
    DEV ? `style-src 'self' 'unsafe-inline'` : `style-src 'self' 'nonce-${nonce}'`,
    // Attributes only: charts and measured table heights set their own.
    `style-src-attr 'unsafe-inline'`,
    `img-src 'self' data: blob:`,
    `font-src 'self'`,
    `object-src 'none'`,
    `base-uri 'none'`,
    `form-action 'self'`,
    `frame-ancestors 'none'`,
    ...(HTTPS ? ['upgrade-insecure-requests'] : []),
  ].join('; ');
}

/** Pages only. What is the same for every answer stands in next.config.mjs. */
export function proxy(request: NextRequest): NextResponse {
  // No text in PostgreSQL holds a NUL, so no address of ours does; a query with one would be an error of the database.
  if (request.nextUrl.search.includes('%00'))
    return new NextResponse('This address holds a NUL character, which none of ours does.', { status: 400 });
  const policy = contentSecurityPolicy(randomBytes(16).toString('base64'));
  const headers = new Headers(request.headers);
  headers.set('Content-Security-Policy', policy);
  headers.set(PATH_HEADER, request.nextUrl.pathname + request.nextUrl.search);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('Content-Security-Policy', policy);
  if (HTTPS) response.headers.set('Strict-Transport-Security', 'max-age=63072000');
  return response;
}

// Never /api: behind this file a route handler is given the first 10 MB of a body only, and an upload would be cut off silently.
export const config = { matcher: ['/((?!api/|_next/static|_next/image|favicon.ico).*)'] };
