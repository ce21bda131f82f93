import { once } from 'node:events';
import { finished } from 'node:stream/promises';
import type pg from 'pg';
import { from as copyFrom, type CopyStreamQuery } from 'pg-copy-streams';
import { ROW_COLUMNS } from './row-codec';

/** Lines are gathered to this many characters before they go to the socket. */
const BLOCK = 64 * 1024;

/** Streams lines of COPY text into `mass_rows` on a connection that does nothing else meanwhile. */
export class RowCopy {
  readonly #stream: CopyStreamQuery;
  #block = '';
  #failure: Error | null = null;

  constructor(
    client: pg.PoolClient,
    private readonly revisionId: string,
  ) {
    this.#stream = client.query(
      copyFrom(`copy mass_rows (revision_id, ${ROW_COLUMNS.join(', ')}) from stdin`),
    );
    this.#stream.on('error', (error) => {
      this.#failure = error;
    });
  }

  /** Adds one line (without the revision's id). Resolves at once, or when the server has caught up. */
  async write(line: string): Promise<void> {
    this.#block += `${this.revisionId}\t${line}`;
    if (this.#block.length >= BLOCK) await this.#flush();
  }

  /** Sends what is left and waits for the server's word that all rows are in. Throws what the server said. */
  async end(): Promise<void> {
    await this.#flush();
    this.#stream.end();
    await finished(this.#stream);
  }

  /** Gives up: the server drops what it has. */
  async abort(reason: Error): Promise<void> {
    this.#stream.destroy(reason);
    await finished(this.#stream).catch((error: unknown) => {
      if (error !== reason) this.#failure ??= error instanceof Error ? error : new Error(String(error));
    });
  }

  async #flush(): Promise<void> {
    if (this.#failure !== null) throw this.#failure;
    const block = this.#block;
    this.#block = '';
    if (block !== '' && !this.#stream.write(block)) await once(this.#stream, 'drain');
    if (this.#failure !== null) throw this.#failure;
  }
}
