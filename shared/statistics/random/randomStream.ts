import { StatisticsError } from '../StatisticsError.ts'

/**
 * Numbers in [0, 1) in steps of 2⁻³², the same ones for the same seed on every machine.
 * xoshiro128++, its state filled from the seed by SplitMix32; a whole number below k is
 * Math.floor(next() * k), whose bias (k/2³²) is far below what a bootstrap can show.
 * @param seed a whole number 0…2³²−1
 * @throws StatisticsError 'out-of-range'
 * Source: Blackman & Vigna 2021, ACM Trans Math Softw 47:36.
 */
export function randomStream(seed: number): () => number {
  if (!Number.isSafeInteger(seed) || seed < 0 || seed > 0xffffffff) {
    throw new StatisticsError(
      'out-of-range',
      'The seed must be a whole number from 0 to 4294967295.',
    )
  }
  let mixer = seed | 0
  const mix = () => {
    mixer = (mixer + 0x9e3779b9) | 0
    let z = mixer ^ (mixer >>> 16)
    z = Math.imul(z, 0x21f0aaad)
    z ^= z >>> 15
    z = Math.imul(z, 0x735a2d97)
    return z ^ (z >>> 15)
  }
  let a = mix()
  let b = mix()
  let c = mix()
  let d = mix()
  return () => {
    const sum = (a + d) | 0
    const result = (((sum << 7) | (sum >>> 25)) + a) | 0
    const shifted = b << 9
    c ^= a
    d ^= b
    b ^= c
    a ^= d
    c ^= shifted
    d = (d << 11) | (d >>> 21)
    return (result >>> 0) / 4294967296
  }
}
