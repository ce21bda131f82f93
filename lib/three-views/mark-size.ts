/** Radius (m on the sheet) of a mark of 1 kg, when the heaviest mark of all gets `largest`: r = radiusOfOne sqrt(|m|). */
export function radiusOfOne(masses: readonly number[], largest: number): number {
  const heaviest = masses.reduce((most, mass) => Math.max(most, Math.abs(mass)), 0);
  return heaviest === 0 ? 0 : largest / Math.sqrt(heaviest);
}

/** Area goes with mass, whatever its sign. */
export const markRadius = (mass: number, ofOne: number): number => ofOne * Math.sqrt(Math.abs(mass));
