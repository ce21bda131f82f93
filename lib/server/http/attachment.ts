/** A file for the browser to keep, never to show: its name without folders, quotes or control characters, its type not to be guessed at. */
export function attachment(body: BodyInit, file: { readonly name: string; readonly type: string }): Response {
  return new Response(body, {
    headers: {
      'Content-Type': file.type,
      'Content-Disposition': disposition(file.name),
      'X-Content-Type-Options': 'nosniff',
      'Cache-Control': 'private, no-store',
    },
  });
}

export const CSV_TYPE = 'text/csv; charset=utf-8';

/** RFC 6266, with the plain name for clients that do not read the encoded one. */
function disposition(name: string): string {
  const safe = name.replace(/[\p{Cc}\p{Cf}/\\]/gu, '').replace(/^\.+/, '') || 'download';
  const plain = safe.replace(/[^\x20-\x7e]|["%;]/g, '_');
  const encoded = encodeURIComponent(safe).replace(
    /['()*]/g,
    (mark) => `%${mark.charCodeAt(0).toString(16)}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`;
}

/** A body that is read from `pieces` as fast as the browser takes it. */
export function streamOf(pieces: AsyncIterable<string | Uint8Array>): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  const iterator = pieces[Symbol.asyncIterator]();
  return new ReadableStream<Uint8Array>({
    async pull(controller) {
      const next = await iterator.next();
      if (next.done === true) controller.close();
      else controller.enqueue(typeof next.value === 'string' ? encoder.encode(next.value) : next.value);
    },
    async cancel() {
      await iterator.return?.();
    },
  });
}
