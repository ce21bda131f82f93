import { expect } from 'vitest';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { problemSchema } from '@/lib/contracts/api/problem';
import { ERROR_CODES, problemType } from '@/lib/errors';
import { problemCodesOf } from '@/lib/server/api/openapi/responses';
import { type Person } from '@/lib/server/actor';
import { makeToken } from '@/lib/server/tokens/make-token';
import { type TokenScope } from '@/lib/token-scopes';
import { type ProgramUnderTest } from '@/tests/support/program';

interface Call {
  readonly token?: string;
  readonly params?: Readonly<Record<string, string>>;
  readonly query?: Readonly<Record<string, string>> | string;
  readonly headers?: Readonly<Record<string, string>>;
  /** All but a stream is sent with its length, unless `headers` say otherwise. */
  readonly body?: string | Uint8Array | ReadableStream<Uint8Array>;
  readonly signal?: AbortSignal;
}

export interface Answered {
  readonly status: number;
  readonly headers: Headers;
  /** Empty where the answer is no JSON. */
  readonly body: Record<string, unknown>;
  readonly text: string;
}

type Route<P> = (request: Request, context: { params: Promise<P> }) => Promise<Response>;

/**
 * A caller of one endpoint's route. Each answer must be one that the endpoint documents, member for member; `seen` collects the
 * statuses.
 */
export function callerOfEndpoint<P>(endpoint: Endpoint, route: Route<P>) {
  const seen = new Set<number>();
  const call = async (said: Call = {}): Promise<Answered> => {
    const response = await route(requestOf(endpoint, said), {
      params: Promise.resolve((said.params ?? {}) as P),
    });
    const text = await response.text();
    const isJson = response.headers.get('content-type')?.includes('json') === true;
    const body = isJson ? (JSON.parse(text) as Record<string, unknown>) : {};
    expectDocumented(endpoint, response, isJson ? body : text);
    seen.add(response.status);
    return { status: response.status, headers: response.headers, body, text };
  };
  return { call, seen };
}

/** Statuses that the endpoint documents; 500 is of faults that are not known. */
export function documentedStatuses(endpoint: Endpoint): number[] {
  const failures = problemCodesOf(endpoint).map((code) => ERROR_CODES[code].status);
  const all = new Set([...Object.keys({ ...endpoint.answers, ...endpoint.bare }).map(Number), ...failures]);
  return [...all].filter((status) => status !== 500).sort((a, b) => a - b);
}

export const sorted = (statuses: ReadonlySet<number>): number[] => [...statuses].sort((a, b) => a - b);

function requestOf(endpoint: Endpoint, { params = {}, query, token, body, headers, signal }: Call): Request {
  const path = endpoint.path.replace(/\{(\w+)\}/g, (_, name: string) => params[name] ?? '');
  const search = query === undefined ? '' : `?${new URLSearchParams(query).toString()}`;
  const type = endpoint.body?.type;
  const length = typeof body === 'string' || body instanceof Uint8Array ? Buffer.byteLength(body) : null;
  return new Request(`http://polhode.example/api/v1${path}${search}`, {
    method: endpoint.method.toUpperCase(),
    ...(body === undefined ? {} : { body: body as BodyInit, duplex: 'half' }),
    ...(signal === undefined ? {} : { signal }),
    headers: {
      ...(token === undefined ? {} : { Authorization: `Bearer ${token}` }),
      ...(type === undefined ? {} : { 'Content-Type': type }),
      ...(length === null ? {} : { 'Content-Length': String(length) }),
      ...headers,
    },
  });
}

function expectDocumented(endpoint: Endpoint, response: Response, body: unknown): void {
  const answer = endpoint.answers[response.status];
  if (answer) {
    const type = response.headers.get('content-type')?.split(';')[0];
    expect(type).toBe(answer.type ?? 'application/json');
    expect(answer.schema.parse(body)).toEqual(body);
    for (const name of Object.keys(answer.headers ?? {}))
      expect(response.headers.get(name), name).not.toBeNull();
    return;
  }
  if (endpoint.bare?.[response.status] !== undefined) {
    expect([body, response.headers.get('content-type')]).toEqual(['', null]);
    return;
  }
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  const problem = problemSchema.parse(body);
  expect(problem).toEqual(body);
  const code = problemCodesOf(endpoint).find((one) => problemType(one) === problem.type);
  expect(code, `${endpoint.operationId} does not document ${problem.type}: ${problem.detail}`).toBeDefined();
  if (code) expect(ERROR_CODES[code].status).toBe(response.status);
}

/** A token of one of the crew, for the program of the test. */
export function tokenOf(
  test: ProgramUnderTest,
  person: Person,
  scopes: readonly TokenScope[],
  programs: readonly string[] | null = null,
): Promise<string> {
  return makeToken(test.db, { person, name: 'for the test', scopes, programs, days: 1 });
}

/** Leaves nothing of the API's quota, until `restoreQuotas`. */
export async function useUpQuota(test: ProgramUnderTest): Promise<void> {
  await test.db
    .updateTable('rate_limits')
    .set({ count: 10_000 })
    .where((eb) => eb.or([eb('bucket', 'like', 'api:%'), eb('bucket', 'like', 'roll-ups:%')]))
    .execute();
}

export async function restoreQuotas(test: ProgramUnderTest): Promise<void> {
  await test.db.deleteFrom('rate_limits').execute();
}
