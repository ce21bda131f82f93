import { type Answer, type Endpoint } from '@/lib/contracts/api/endpoint';
import { problemSchema } from '@/lib/contracts/api/problem';
import { ERROR_CODES, type ErrorCode, problemType } from '@/lib/errors';
import { type Json, type SchemaBook } from './schemas';

/** What every endpoint with a token can answer besides its own problems. */
const WITH_TOKEN: readonly ErrorCode[] = ['invalid-token', 'too-many-requests', 'internal'];

const header = (name: string): Json => ({ [name]: { $ref: `#/components/headers/${name}` } });
const RATE_HEADERS = { ...header('RateLimit'), ...header('RateLimit-Policy') };

/** Headers that more than one answer has. */
export const HEADERS: Json = {
  RateLimit: {
    description: 'What is left of the quota and seconds until it is full again, e.g. `"api";r=599;t=60`',
    schema: { type: 'string' },
  },
  'RateLimit-Policy': {
    description: 'The quota and its window in seconds, e.g. `"api";q=600;w=60`',
    schema: { type: 'string' },
  },
  'Retry-After': { description: 'Seconds after which another try makes sense', schema: { type: 'integer' } },
  'WWW-Authenticate': { description: 'RFC 6750', schema: { type: 'string' } },
};

/** All that an endpoint answers, by status: its answers, then its problems. */
export function responsesOf(endpoint: Endpoint, book: SchemaBook): Json {
  const responses: Json = {};
  for (const [status, answer] of Object.entries(endpoint.answers)) {
    responses[status] = answered(answer, endpoint.scope !== null, book);
  }
  for (const [status, description] of Object.entries(endpoint.bare ?? {})) {
    responses[status] = { description, headers: RATE_HEADERS };
  }
  for (const [status, codes] of problemsByStatus(endpoint)) responses[String(status)] = failed(codes, book);
  return responses;
}

function answered(
  { description, schema, example, type, headers = {} }: Answer,
  metered: boolean,
  book: SchemaBook,
): Json {
  const own = Object.entries(headers).map(([name, says]) => [
    name,
    { description: says, schema: { type: 'string' } },
  ]);
  return {
    description,
    headers: { ...(metered ? RATE_HEADERS : {}), ...Object.fromEntries(own) },
    content: { [type ?? 'application/json']: { schema: book.of(schema, 'output'), example } },
  };
}

/** Every way in which an endpoint can fail, with what all endpoints of its kind share. */
export function problemCodesOf({ scope, problems }: Endpoint): ErrorCode[] {
  if (scope === null) return [...problems, 'internal'];
  return [...problems, ...WITH_TOKEN, ...(scope === 'any' ? [] : ['insufficient-scope' as const])];
}

function problemsByStatus(endpoint: Endpoint): [number, ErrorCode[]][] {
  const byStatus = new Map<number, ErrorCode[]>();
  for (const code of problemCodesOf(endpoint)) {
    const { status } = ERROR_CODES[code];
    byStatus.set(status, [...(byStatus.get(status) ?? []), code]);
  }
  return [...byStatus].sort(([a], [b]) => a - b);
}

function failed(codes: readonly ErrorCode[], book: SchemaBook): Json {
  const { status } = ERROR_CODES[codes[0] ?? 'internal'];
  return {
    description: codes.map((code) => ERROR_CODES[code].title).join('; '),
    ...headersOf(status),
    content: {
      'application/problem+json': {
        schema: book.of(problemSchema, 'output'),
        examples: Object.fromEntries(codes.map((code) => [code, { value: exampleOf(code) }])),
      },
    },
  };
}

function headersOf(status: number): Json {
  if (status === 401) return { headers: header('WWW-Authenticate') };
  return status === 429 || status === 503 ? { headers: header('Retry-After') } : {};
}

function exampleOf(code: ErrorCode): Json {
  const { status, title } = ERROR_CODES[code];
  return { type: problemType(code), title, status, detail: `${title}.` };
}
