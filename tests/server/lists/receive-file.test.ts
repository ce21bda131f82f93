import { createHash } from 'node:crypto';
import { setTimeout as delay } from 'node:timers/promises';
import { ListObjectsV2Command } from '@aws-sdk/client-s3';
import { describe, expect, it } from 'vitest';
import { AppError } from '@/lib/errors';
import { receiveFile } from '@/lib/server/lists/receive-file';
import { objectStore } from '@/lib/server/storage/client';
import { objectExists, openObject } from '@/lib/server/storage/open-object';

const encoder = new TextEncoder();

function upload(body: BodyInit | null, headers: Record<string, string> = {}, signal?: AbortSignal): Request {
  return new Request('http://polhode.example/upload', {
    method: 'POST',
    body,
    headers: { 'Content-Type': 'text/csv', ...headers },
    ...(signal === undefined ? {} : { signal }),
    ...(body instanceof ReadableStream ? { duplex: 'half' } : {}),
  });
}

const text = (content: string, headers: Record<string, string> = {}): Request =>
  upload(content, { 'Content-Length': String(Buffer.byteLength(content)), ...headers });

const receive = (request: Request, maxBytes = 1024 ** 2) => receiveFile(request, { maxBytes });

async function refusalOf(work: Promise<unknown>): Promise<AppError> {
  const outcome = await work.then(
    () => null,
    (error: unknown) => error,
  );
  if (!(outcome instanceof AppError)) throw new Error(`Expected an AppError, got ${String(outcome)}`);
  return outcome;
}

const sha256 = (content: string): string => createHash('sha256').update(content).digest('hex');

async function incoming(): Promise<number> {
  const { client, bucket } = objectStore();
  const listed = await client.send(new ListObjectsV2Command({ Bucket: bucket, Prefix: 'incoming/' }));
  return listed.KeyCount ?? NaN;
}

describe('a received file', () => {
  it('is stored byte for byte under its SHA-256, its lines counted over all pieces', async () => {
    const piece = `${'x'.repeat(999)}\n`;
    let sent = 0;
    const body = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += 1;
        if (sent > 9000) controller.close();
        else controller.enqueue(encoder.encode(piece));
      },
    });
    const received = await receive(upload(body, { 'Content-Length': '9000000' }), 9_000_000);
    expect(received).toEqual({
      sha256: sha256(piece.repeat(9000)),
      bytes: 9_000_000,
      lines: 9000,
      name: 'upload.csv',
    });
    let kept = 0;
    for await (const chunk of await openObject(received.sha256)) kept += (chunk as Buffer).length;
    expect(kept).toBe(9_000_000);
  });

  it.each([
    ['a\nb\n', 2],
    ['a\nb', 2],
    ['a\r\nb\r\n', 2],
    ['\n\n', 2],
    ['a', 1],
  ])('%j has as many lines as an editor shows', async (content, lines) => {
    expect((await receive(text(content))).lines).toBe(lines);
  });

  it.each([
    [{ 'X-File-Name': 'Fl%C3%BCgel%203.csv' }, 'Flügel 3.csv'],
    [{ 'X-File-Name': '100% wing.csv' }, '100% wing.csv'],
    [{ 'X-File-Name': '..%2F..%2Fetc%2Fpasswd' }, 'passwd'],
    [{ 'X-File-Name': 'C:\\lists\\wing.csv' }, 'wing.csv'],
    [{ 'X-File-Name': 'wing%0D%0AX-Evil%3A1.csv' }, 'wingX-Evil:1.csv'],
    [{ 'X-File-Name': 'vsc%E2%80%AEgniw.csv' }, 'vscgniw.csv'],
    [{ 'X-File-Name': '...' }, 'upload.csv'],
    [{ 'X-File-Name': `${'x'.repeat(300)}.csv` }, 'x'.repeat(150)],
    [{ 'Content-Disposition': 'attachment; filename="wing \\"3\\".csv"' }, 'wing "3".csv'],
    [{ 'Content-Disposition': "attachment; filename=w.csv; filename*=UTF-8''Fl%C3%BCgel.csv" }, 'Flügel.csv'],
    [{ 'Content-Disposition': 'attachment; filename=wing.csv' }, 'wing.csv'],
    [{}, 'upload.csv'],
  ])('sent with %j is named %s', async (headers, name) => {
    expect((await receive(text('a\n', headers as Record<string, string>))).name).toBe(name);
  });

  it('is refused before its first byte for length, type and missing content', async () => {
    const untouched = (headers: Record<string, string>) => {
      const body = new ReadableStream<Uint8Array>({
        pull: (controller) => controller.enqueue(encoder.encode('x')),
      });
      return { body, request: upload(body, headers) };
    };
    for (const [headers, code] of [
      [{ 'Content-Length': '1048577' }, 'too-large'],
      [{ 'Content-Length': '-1' }, 'invalid-request'],
      [{}, 'length-required'],
      [{ 'Content-Length': '10', 'Content-Type': 'application/zip' }, 'unsupported-media-type'],
    ] as const) {
      const { body, request } = untouched(headers);
      expect((await refusalOf(receive(request))).code).toBe(code);
      expect(body.locked && request.bodyUsed).toBe(false);
    }
    expect((await refusalOf(receive(upload(null, { 'Content-Length': '0' })))).message).toBe(
      'The file is empty.',
    );
  });

  it('is refused and not kept when it is longer or shorter than declared', async () => {
    for (const declared of ['3', '5']) {
      const content = `${declared}bcd`;
      const error = await refusalOf(receive(text(content, { 'Content-Length': declared })));
      expect(error.code).toBe('invalid-request');
      expect(await objectExists(sha256(content))).toBe(false);
    }
    expect(await incoming()).toBe(0);
  });

  it('is not kept when its sender goes away', async () => {
    const gone = new AbortController();
    const body = new ReadableStream<Uint8Array>({
      start: (controller) => controller.enqueue(encoder.encode('item,')),
    });
    const work = receive(upload(body, { 'Content-Length': '100' }, gone.signal));
    setTimeout(() => gone.abort(), 50);
    expect((await refusalOf(work)).code).toBe('invalid-request');
    expect(await incoming()).toBe(0);
  });

  it('is not kept when its connection breaks', async () => {
    const body = new ReadableStream<Uint8Array>({
      async pull(controller) {
        await delay(20);
        controller.error(new Error('ECONNRESET'));
      },
    });
    const error = await refusalOf(receive(upload(body, { 'Content-Length': '100' })));
    expect([error.code, error.message]).toEqual([
      'invalid-request',
      'The body broke off before its end. Nothing was kept.',
    ]);
    expect(await incoming()).toBe(0);
  });
});
