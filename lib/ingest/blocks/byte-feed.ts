const NEWLINE = 10;

/** Bytes that are read at once, what is left of the bytes before included: a record is whole unless it is longer. */
export const FEED_BYTES = 65_536;

/**
 * A byte stream as a buffer that is filled again and again: what has not been used up stays at its beginning. Behind the bytes of the
 * stream there are `room` bytes for whoever wants to write beside them.
 */
export class ByteFeed {
  readonly buffer;
  /** Bytes in use, and bytes of the stream before them that are used up. */
  filled = 0;
  before = 0;
  ended = false;
  readonly #source: AsyncIterator<Uint8Array>;
  #piece: Uint8Array = new Uint8Array(0);

  constructor(bytes: AsyncIterable<Uint8Array>, room: number) {
    this.buffer = new Uint8Array(FEED_BYTES + room);
    this.#source = bytes[Symbol.asyncIterator]();
  }

  /** Drops the first `used` bytes and reads until the buffer is full or the stream at its end. */
  async fill(used: number): Promise<void> {
    this.buffer.copyWithin(0, used, this.filled);
    this.filled -= used;
    this.before += used;
    // One byte stays free for the line end that the last line may lack.
    while (this.filled < FEED_BYTES - 1) {
      if (this.#piece.length === 0) {
        const { done, value } = await this.#source.next();
        if (done === true) {
          this.ended = true;
          return;
        }
        this.#piece = value;
      }
      const part = this.#piece.subarray(0, FEED_BYTES - 1 - this.filled);
      this.buffer.set(part, this.filled);
      this.filled += part.length;
      this.#piece = this.#piece.subarray(part.length);
    }
  }

  /** How far there are whole lines; at the end of the stream its last line gets the line end that it lacks, beyond `filled`. */
  wholeLines(): number {
    const end = this.filled === 0 ? 0 : this.buffer.lastIndexOf(NEWLINE, this.filled - 1) + 1;
    if (!this.ended || end === this.filled) return end;
    this.buffer[this.filled] = NEWLINE;
    return this.filled + 1;
  }

  /** What is left of the stream, `from` of the buffer on. */
  async *rest(from: number): AsyncGenerator<Uint8Array> {
    yield this.buffer.slice(from, this.filled);
    if (this.#piece.length > 0) yield this.#piece;
    if (this.ended) return;
    for (;;) {
      const { done, value } = await this.#source.next();
      if (done === true) return;
      yield value;
    }
  }

  /** Tells the source that nothing more will be asked for. */
  async close(): Promise<void> {
    await this.#source.return?.();
  }
}
