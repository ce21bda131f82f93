/** What a row's columns show at a glance, as bits: why a rule that judges rows one by one may have to see it as an object. */
export const TRAITS = {
  memo: 1,
  /** Zero mass, counted. */
  massless: 1 << 1,
  negative: 1 << 2,
  pair: 1 << 3,
  /** Mass at 0, 0, 0 of the list, counted. */
  onDatum: 1 << 4,
  /** Own moments that are not beyond doubt those of a body, counted. */
  tensor: 1 << 5,
  /** Own moments that may be less than a ball of metal has, counted. */
  dense: 1 << 6,
  /** Own moments as large as the transfer to the datum, counted. */
  transfer: 1 << 7,
  /** Own moments that may need more room than the aircraft has, counted. */
  reach: 1 << 8,
  /** A σ larger than its value, counted. */
  vague: 1 << 9,
  /** Weighed and with growth above zero; estimated and with growth of zero or less; counted. */
  grownActual: 1 << 10,
  ungrownEstimate: 1 << 11,
  /** An adjustment that is not approved, counted. */
  waiting: 1 << 12,
  noMaturity: 1 << 13,
  noGroup: 1 << 14,
  /** Mirrored and on the plane of symmetry, or nearly so, counted. */
  onPlane: 1 << 15,
  /** Outside the aircraft, or nearly so, counted. */
  outside: 1 << 16,
  /** In a group that the program does not know, counted. */
  unknownGroup: 1 << 17,
} as const;
