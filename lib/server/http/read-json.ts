import { type z } from 'zod';
import { inputWords } from '@/lib/contracts/input-words';
import { AppError, type InputError } from '@/lib/errors';

/** JSON bodies are at most this long, whoever sends them. */
export const JSON_BYTES = 1024 * 1024;

/** The body as JSON of the schema's shape. Throws `unsupported-media-type`, `too-large`, `invalid-request` or `invalid-input`. */
export async function readJson<S extends z.ZodType>(request: Request, schema: S): Promise<z.output<S>> {
  const type = (request.headers.get('content-type') ?? '').split(';')[0]?.trim().toLowerCase();
  if (type !== 'application/json') {
    throw new AppError('unsupported-media-type', 'Send the body as application/json.');
  }
  const parsed = schema.safeParse(parse(await readText(request)), { error: inputWords });
  if (!parsed.success) throw inputErrorOf(parsed.error);
  return parsed.data;
}

async function readText(request: Request): Promise<string> {
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  const body: AsyncIterable<Uint8Array> | null = request.body;
  for await (const chunk of body ?? []) {
    bytes += chunk.byteLength;
    if (bytes > JSON_BYTES) throw new AppError('too-large', `A JSON body has at most ${JSON_BYTES} bytes.`);
    chunks.push(chunk);
  }
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks));
  } catch (error) {
    throw new AppError('invalid-request', 'The body is not UTF-8.', { cause: error });
  }
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    throw new AppError('invalid-request', `The body is not JSON: ${reason}.`);
  }
}

/** A schema's complaints as `invalid-input`, each with its JSON pointer. */
export function inputErrorOf(error: z.ZodError): AppError {
  const errors: InputError[] = error.issues.map((issue) => ({
    pointer: issue.path
      .map((step) => `/${String(step).replaceAll('~', '~0').replaceAll('/', '~1')}`)
      .join(''),
    message: issue.message,
  }));
  const first = errors[0];
  const where = first?.pointer ? `${first.pointer}: ` : '';
  const more = errors.length > 1 ? ` (and ${errors.length - 1} more)` : '';
  return new AppError('invalid-input', `${where}${first?.message ?? 'not valid'}${more}`, { errors });
}
