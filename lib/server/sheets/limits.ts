/** What a workbook may hold. It is read in memory, so that the largest takes a few hundred MB; a longer list comes as CSV. */
export const WORKBOOK_LIMITS = {
  /** Of the file. */
  bytes: 32 * 1024 ** 2,
  /** Of the parts that are read, unpacked. */
  unpackedBytes: 128 * 1024 ** 2,
  parts: 2_000,
  /** Unpacked to packed, of a part of more than a MiB. Sheets of figures reach about 20. */
  ratio: 200,
  rows: 100_000,
  columns: 256,
} as const;
