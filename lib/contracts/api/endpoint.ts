import { type z } from 'zod';
import { type ErrorCode } from '@/lib/errors';
import { type TokenScope } from '@/lib/token-scopes';

type Members = z.ZodObject<Record<string, z.ZodType>>;

export interface JsonBody {
  readonly type: 'application/json';
  readonly description: string;
  readonly schema: z.ZodType;
  readonly example: unknown;
}

export interface CsvBody {
  readonly type: 'text/csv';
  readonly description: string;
  readonly maxBytes: number;
  readonly example: string;
}

export interface Answer {
  readonly description: string;
  readonly schema: z.ZodType;
  readonly example: unknown;
  /** JSON unless said; the schema of another type is that of its text. */
  readonly type?: 'text/csv';
  /** Headers of its own and what they say. */
  readonly headers?: Readonly<Record<string, string>>;
}

/**
 * One endpoint of the JSON API as its callers know it. Its route handler takes scope, schemas and limits from here, and the
 * OpenAPI document is made of nothing else; so what is documented is what is done.
 */
export interface Endpoint {
  readonly method: 'get' | 'post' | 'put';
  /** Below /api/v1, with `{name}` for each member of `pathParameters`. */
  readonly path: `/${string}`;
  readonly operationId: string;
  readonly summary: string;
  readonly description: string;
  /** The scope that a token must have; `any`: every valid token; null: no token. */
  readonly scope: TokenScope | 'any' | null;
  readonly pathParameters?: Members;
  readonly query?: Members;
  /** Request headers that the endpoint reads, besides Authorization. */
  readonly headers?: Members;
  readonly body?: JsonBody | CsvBody;
  /** By status. */
  readonly answers: Readonly<Record<number, Answer>>;
  /** Statuses without a body, and what they say. */
  readonly bare?: Readonly<Record<number, string>>;
  /** Ways to fail of its own; what every endpoint with a token can answer is added. */
  readonly problems: readonly ErrorCode[];
}
