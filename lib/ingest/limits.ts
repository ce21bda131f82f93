/** What a file may hold. Text lengths are in UTF-16 code units, as JavaScript counts them. */
export interface IngestLimits {
  readonly recordLength: number;
  readonly fieldLength: number;
  readonly columns: number;
  readonly rows: number;
}

export const MASS_LIST_LIMITS: IngestLimits = {
  recordLength: 65_536,
  fieldLength: 8_192,
  columns: 256,
  rows: 2_000_000,
};

/** A file that becomes a list is at most this long, bytes. */
export const LIST_BYTES = 1024 ** 3;

/** One that is rolled up while the caller waits. */
export const ROLL_UP_BYTES = 32 * 1024 ** 2;

export const ROTOR_LIMITS: IngestLimits = { ...MASS_LIST_LIMITS, rows: 10_000 };

/** So many problems of a file are kept; the rest are counted. */
export const PROBLEMS_KEPT = 200;

/** So much of a cell is quoted in a problem. */
export const FOUND_LENGTH = 80;
