import { type z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';

/** An answer of an endpoint through its schema: members that are not documented do not leave. */
export function respond<E extends Endpoint, S extends keyof E['answers'] & number>(
  endpoint: E,
  status: S,
  value: z.input<E['answers'][S]['schema']>,
  headers: Record<string, string> = {},
): Response {
  const answer = endpoint.answers[status];
  if (answer === undefined) throw new Error(`${endpoint.operationId} documents no answer ${status}.`);
  return Response.json(answer.schema.parse(value), { status, headers });
}
