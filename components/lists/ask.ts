import { type z } from 'zod';

/** A request that the server answered with a problem (RFC 9457) or did not answer. `message` is a sentence for people. */
export class AskFailed extends Error {
  override readonly name = 'AskFailed';

  constructor(
    message: string,
    /** HTTP status; 0 when there was no answer. */
    readonly status: number,
  ) {
    super(message);
  }
}

const NO_ANSWER = 'The server did not answer. Check the connection, then try again.';

/** The sentence of a problem's body, or one for answers that are none. */
export function problemWords(body: unknown, status: number): string {
  if (typeof body === 'object' && body !== null && 'detail' in body && typeof body.detail === 'string')
    return body.detail;
  return status === 0 ? NO_ANSWER : `The server answered ${status} without saying why. Try again.`;
}

/** Asks one of our own internal routes and reads the answer by its schema. @throws AskFailed */
export async function ask<S extends z.ZodType>(
  url: string,
  schema: S,
  init: RequestInit = {},
): Promise<z.output<S>> {
  const response = await fetch(url, {
    ...init,
    headers: { Accept: 'application/json', ...init.headers },
  }).catch((reason: unknown) => {
    if (reason instanceof DOMException && reason.name === 'AbortError') throw reason;
    throw new AskFailed(NO_ANSWER, 0);
  });
  const text = await response.text();
  if (!response.ok) throw new AskFailed(problemWords(jsonOf(text), response.status), response.status);
  return schema.parse(jsonOf(text));
}

/** Null where the text is no JSON: what stands between browser and server answers with pages of its own. */
function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch (error) {
    if (error instanceof SyntaxError) return null;
    throw error;
  }
}
