/**
 * Numbers between −1 and 1 that repeat for the same seed.
 * Source: Park & Miller 1988, the minimal standard generator.
 */
export function seededNoise(seed: number): () => number {
  let state = seed
  return () => {
    state = (state * 16_807) % 2_147_483_647
    return (2 * state) / 2_147_483_647 - 1
  }
}
