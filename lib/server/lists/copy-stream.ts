import { once } from 'node:events';
import { finished } from 'node:stream/promises';
import type pg from 'pg';
import { from as copyFrom, type CopyStreamQuery } from 'pg-copy-streams';

/** `PGCOPY\n\377\r\n\0`, no flags, no extension; and the end, a field count of -1. */
const SIGNATURE = Buffer.from('5047434f50590aff0d0a000000000000000000', 'hex');
const TRAILER = Buffer.from('ffff', 'hex');

/** A COPY of rows in PostgreSQL's binary format, on a connection that does nothing else meanwhile. */
export class BinaryCopy {
  readonly #stream: CopyStreamQuery;
  #failure: Error | null = null;

  constructor(client: pg.PoolClient, table: string, columns: readonly string[]) {
    this.#stream = client.query(
      copyFrom(`copy ${table} (${columns.join(', ')}) from stdin (format binary)`, {
        highWaterMark: 1024 * 1024,
      }),
    );
    this.#stream.on('error', (error) => {
      this.#failure = error;
    });
    this.#stream.write(SIGNATURE);
  }

  /** Takes the bytes of whole rows, which must not be changed afterwards. Resolves at once, or when the server has caught up. */
  async write(rows: Buffer): Promise<void> {
    if (this.#failure !== null) throw this.#failure;
    if (!this.#stream.write(rows)) await once(this.#stream, 'drain');
    if (this.#failure !== null) throw this.#failure;
  }

  /** Waits for the server's word that all rows are in. Throws what the server said. */
  async end(): Promise<void> {
    if (this.#failure !== null) throw this.#failure;
    this.#stream.end(TRAILER);
    await finished(this.#stream);
  }

  /** Gives up: the server drops what it has. */
  async abort(reason: Error): Promise<void> {
    this.#stream.destroy(reason);
    await finished(this.#stream).catch((error: unknown) => {
      if (error !== reason) this.#failure ??= error instanceof Error ? error : new Error(String(error));
    });
  }
}
