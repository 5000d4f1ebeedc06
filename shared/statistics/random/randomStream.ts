import { StatisticsError } from '../StatisticsError.ts'

const BLOCK = 1024

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
  const state = Int32Array.of(mix(), mix(), mix(), mix())
  const block = new Uint32Array(BLOCK)
  let position = BLOCK
  return () => {
    if (position === BLOCK) {
      fill(block, state)
      position = 0
    }
    return block[position++]! / 4294967296
  }
}

/** The next numbers of the generator, a block at a time: its state then stays in registers. */
function fill(block: Uint32Array, state: Int32Array): void {
  let a = state[0]!
  let b = state[1]!
  let c = state[2]!
  let d = state[3]!
  for (let i = 0; i < block.length; i++) {
    const sum = (a + d) | 0
    block[i] = (((sum << 7) | (sum >>> 25)) + a) | 0
    const shifted = b << 9
    c ^= a
    d ^= b
    b ^= c
    a ^= d
    c ^= shifted
    d = (d << 11) | (d >>> 21)
  }
  state[0] = a
  state[1] = b
  state[2] = c
  state[3] = d
}
