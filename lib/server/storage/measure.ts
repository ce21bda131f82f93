import { createHash } from 'node:crypto';
import { Transform, type TransformCallback } from 'node:stream';

/** Passes bytes on while counting and hashing them; `check` sees each new count and may refuse by throwing. */
export class Measure extends Transform {
  private readonly hash = createHash('sha256');
  bytes = 0;
  /** Hex; known when the stream has ended. */
  sha256: string | null = null;

  constructor(
    private readonly check: (bytes: number) => void,
    private readonly atEnd: (sha256: string, bytes: number) => void,
  ) {
    super();
  }

  override _transform(piece: Buffer, _encoding: BufferEncoding, done: TransformCallback): void {
    try {
      this.bytes += piece.length;
      this.check(this.bytes);
      this.hash.update(piece);
    } catch (error) {
      done(error as Error);
      return;
    }
    done(null, piece);
  }

  override _flush(done: TransformCallback): void {
    try {
      this.sha256 = this.hash.digest('hex');
      this.atEnd(this.sha256, this.bytes);
    } catch (error) {
      done(error as Error);
      return;
    }
    done();
  }
}
