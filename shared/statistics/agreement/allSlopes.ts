import type { SlopeRanks } from './passingBablokRegression.ts'

/** A slope this near to −1 is −1 up to the rounding of decimal values. */
export const MINUS_ONE_TOLERANCE = 1e-9

/**
 * All slopes between points, listed and sorted. Vertical ones are ±∞ by the sign of y(i) − y(j), i < j,
 * as in Passing & Bablok 1983.
 */
export function allSlopes(x: Float64Array, y: Float64Array): SlopeRanks {
  const n = x.length
  const list = new Float64Array((n * (n - 1)) / 2)
  let slopes = 0
  let offset = 0
  let identicalPoints = 0
  let slopesOfMinusOne = 0
  for (let i = 0; i < n; i++) {
    for (let j = i + 1; j < n; j++) {
      const dx = x[i]! - x[j]!
      const dy = y[i]! - y[j]!
      if (dx === 0 && dy === 0) {
        identicalPoints++
        continue
      }
      const slope = dx === 0 ? Math.sign(dy) * Infinity : dy / dx
      if (Math.abs(slope + 1) < MINUS_ONE_TOLERANCE) {
        slopesOfMinusOne++
        continue
      }
      if (slope < -1) offset++
      list[slopes++] = slope
    }
  }
  const sorted = list.subarray(0, slopes).sort()
  return {
    slopes,
    offset,
    identicalPoints,
    slopesOfMinusOne,
    at: (ranks) => ranks.map((rank) => sorted[rank - 1]!),
  }
}
