import { Readable } from 'node:stream';
import { delay, http, HttpResponse } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { AppError } from '@/lib/errors';
import { createStore } from '@/lib/server/storage/client';
import { openObject } from '@/lib/server/storage/open-object';
import { storeStream } from '@/lib/server/storage/store-stream';

const ENDPOINT = 'http://s3.polhode.test:9000';
const settings = {
  endpoint: ENDPOINT,
  region: 'us-east-1',
  bucket: 'b',
  accessKeyId: 'k',
  secretAccessKey: 's',
};
const store = createStore(settings);
const HASH = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad';

/** Requests as `METHOD path`, in the order they came; what is under a lasting name and what is not is told by them. */
let seen: string[] = [];
const server = setupServer();
server.events.on('request:start', ({ request }) => {
  seen.push(`${request.method} ${new URL(request.url).pathname.replace(/[0-9a-f-]{36}$/, '*')}`);
});

beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterEach(() => {
  server.resetHandlers();
  seen = [];
});
afterAll(() => server.close());

const object = `${ENDPOINT}/b/:folder/:name`;
const fault = (status: number, code: string) =>
  HttpResponse.xml(`<Error><Code>${code}</Code><Message>${code}</Message></Error>`, { status });
const removed = http.delete(object, () => new HttpResponse(null, { status: 204 }));
const held = (bytes: number) =>
  http.head(object, () => new HttpResponse(null, { headers: { 'content-length': String(bytes) } }));
const took = http.put(object, ({ request }) =>
  request.headers.has('x-amz-copy-source')
    ? fault(503, 'SlowDown')
    : new HttpResponse(null, { headers: { etag: '"x"' } }),
);
const keep = (into = store) =>
  storeStream(Readable.from([Buffer.from('abc')]), { contentLength: 3, store: into });

/** Fails the test unless `work` ends in the one error that callers are told. */
async function failureOf(work: Promise<unknown>): Promise<AppError> {
  const outcome = await work.then(
    () => null,
    (error: unknown) => error,
  );
  if (!(outcome instanceof AppError)) throw new Error(`Expected an AppError, got ${String(outcome)}`);
  return outcome;
}

const lastingNames = () => seen.filter((line) => line.startsWith('PUT /b/sha256/'));

describe('a store that fails while a file is being kept', () => {
  it('is told apart when it is overloaded: tried three times, then refused, nothing named', async () => {
    server.use(
      http.put(object, () => fault(503, 'SlowDown')),
      removed,
    );
    const error = await failureOf(keep());
    expect(error.code).toBe('unavailable');
    expect(error.message).toBe(
      'The file was not stored and nothing of it was kept: the file store does not answer as it should. Try again later.',
    );
    expect(seen.filter((line) => line === 'PUT /b/incoming/*')).toHaveLength(3);
    expect(lastingNames()).toEqual([]);
    expect(seen.at(-1)).toBe('DELETE /b/incoming/*');
  });

  it('is given up when it stays silent', async () => {
    server.use(
      http.put(object, async () => {
        await delay('infinite');
        return fault(500, 'never');
      }),
      removed,
    );
    const error = await failureOf(keep(createStore({ ...settings, patience: 300, attempts: 1 })));
    expect(error.code).toBe('unavailable');
    expect(error.retryAfter).toBe(30);
    expect(lastingNames()).toEqual([]);
  });

  it('says so when the bytes were damaged on the way', async () => {
    server.use(
      http.put(object, () => fault(400, 'BadDigest')),
      removed,
    );
    const error = await failureOf(keep());
    expect(error.message).toContain('the bytes did not arrive there unharmed');
    expect(lastingNames()).toEqual([]);
  });

  it('sends the SHA-256 of the bytes for the store to check', async () => {
    let sent: string | null = null;
    server.use(
      http.put(object, ({ request }) => {
        sent ??= request.headers.get('x-amz-checksum-sha256');
        return fault(400, 'BadDigest');
      }),
      removed,
    );
    await failureOf(keep());
    expect(sent).toBe(Buffer.from(HASH, 'hex').toString('base64'));
  });

  it('gets no lasting name when it holds fewer bytes than it took', async () => {
    server.use(took, held(2), removed);
    const error = await failureOf(keep());
    expect(String(error.cause)).toContain('The store has 2 bytes of 3');
    expect(lastingNames()).toEqual([]);
    expect(seen.at(-1)).toBe('DELETE /b/incoming/*');
  });

  it('is refused when the last step fails, and the incoming bytes go', async () => {
    server.use(took, held(3), removed);
    const error = await failureOf(keep());
    expect(error.code).toBe('unavailable');
    expect(lastingNames()).toHaveLength(3);
    expect(seen.at(-1)).toBe('DELETE /b/incoming/*');
  });

  it('has the file already: that is success', async () => {
    server.use(
      http.put(object, ({ request }) =>
        request.headers.has('x-amz-copy-source')
          ? fault(412, 'PreconditionFailed')
          : new HttpResponse(null, { headers: { etag: '"x"' } }),
      ),
      held(3),
      removed,
    );
    expect(await keep()).toEqual({ sha256: HASH, bytes: 3 });
  });
});

describe('a store that fails while a file is read', () => {
  it('is unavailable when overloaded', async () => {
    server.use(http.get(object, () => fault(503, 'SlowDown')));
    expect((await failureOf(openObject(HASH, store))).code).toBe('unavailable');
  });

  it('is found out when it gives other bytes', async () => {
    server.use(http.get(object, () => HttpResponse.text('abd')));
    const stream = await openObject(HASH, store);
    await expect(stream.toArray()).rejects.toThrow(`The store's bytes for ${HASH}`);
  });
});
