/** Park and Miller's minimal standard generator, 0 to 1: the same numbers on every run. */
export function randomNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

/** Standard normal numbers (Box and Muller 1958), the same on every run. */
export function normalNumbers(seed: number): () => number {
  const random = randomNumbers(seed);
  let spare: number | null = null;
  return () => {
    if (spare !== null) {
      const value = spare;
      spare = null;
      return value;
    }
    const radius = Math.sqrt(-2 * Math.log(random()));
    const angle = 2 * Math.PI * random();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
}
