/** Uniform draws between 0 and 1 from a seed, the same on every machine (a xorshift of 32 bits, mixed). */
export function uniformDraws(seed: number): () => number {
  let state = seed >>> 0 || 1
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(state ^ (state >>> 15), state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32
  }
}

/** Draws of an exponential distribution with the given mean. */
export function exponentialDraws(seed: number, mean: number): () => number {
  const uniform = uniformDraws(seed)
  return () => -mean * Math.log1p(-uniform())
}
