import { COMMA, NEWLINE, POINT, QUOTE, RETURN } from './bytes';

/** Bits of `RowState.marks`: a decimal mark was seen, and seen where it could separate thousands. */
const SEEN = { [COMMA]: 1, [POINT]: 4 } as const;

/** What the fields of a row share while it is read from bytes. */
export class RowState {
  /** Line ends within quoted texts. */
  lineEnds = 0;
  /** 1 once a σ is stated. */
  hasSigma = 0;
  /** Whether the quoted text that was read last is the very bytes between its quotes. */
  isVerbatim = true;
  /** In files with decimal commas: the marks that are noted already, commas 1, points 4, and twice that for doubtful ones. */
  marks = 0;
  /** Where the bytes end. */
  limit = 0;
  /** No byte above it ends a field: the common ones need one comparison. */
  readonly fence: number;

  constructor(
    readonly delimiter: number,
    readonly decimalComma: boolean,
    readonly fieldLength: number,
  ) {
    this.fence = Math.max(delimiter, RETURN);
  }

  isEnd(byte: number | undefined): boolean {
    return byte === this.delimiter || byte === NEWLINE || byte === RETURN;
  }

  /** Where a field without quotes ends. */
  endOfPlain(bytes: Uint8Array, start: number): number {
    const { fence, delimiter } = this;
    let at = start;
    for (;;) {
      let byte = bytes[at] ?? 0;
      while (byte > fence) {
        at += 1;
        byte = bytes[at] ?? 0;
      }
      if (byte === delimiter || byte === NEWLINE || byte === RETURN) return at;
      at += 1;
    }
  }

  /** The quote that closes the text from `at` on; -1 where none does, or where a carriage return alone is in between. */
  closingQuote(bytes: Uint8Array, start: number): number {
    const { limit } = this;
    this.isVerbatim = true;
    for (let at = start; at < limit; at += 1) {
      const byte = bytes[at] ?? 0;
      if (byte === QUOTE) {
        if (bytes[at + 1] !== QUOTE) return at;
        this.isVerbatim = false;
        at += 1;
      } else if (byte === NEWLINE) {
        this.isVerbatim = false;
        this.lineEnds += 1;
      } else if (byte === RETURN) {
        if (bytes[at + 1] !== NEWLINE) return -1;
        this.isVerbatim = false;
      }
    }
    return -1;
  }

  /** Whether a number with this mark is one more to be noted; `isDoubtful` says that the mark could separate thousands. */
  isNewMark(mark: number, isDoubtful: boolean): boolean {
    const seen = mark === COMMA ? SEEN[COMMA] : SEEN[POINT];
    return (this.marks & seen) === 0 || (isDoubtful && (this.marks & (2 * seen)) === 0);
  }
}
