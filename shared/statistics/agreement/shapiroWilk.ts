import { normalQuantile } from '../distributions/normalQuantile.ts'
import { normalUpperTail } from '../distributions/normalUpperTail.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

// polynomial coefficients of algorithm AS R94, lowest power first
const C1 = [0, 0.221157, -0.147981, -2.07119, 4.434685, -2.706056]
const C2 = [0, 0.042981, -0.293762, -1.752461, 5.682633, -3.582633]
const C3 = [0.544, -0.39978, 0.025054, -6.714e-4]
const C4 = [1.3822, -0.77857, 0.062767, -0.0020322]
const C5 = [-1.5861, -0.31082, -0.083751, 0.0038915]
const C6 = [-0.4803, -0.082676, 0.0030302]
const G = [-2.273, 0.459]

/**
 * The Shapiro–Wilk test of normality by Royston's approximation.
 * @param values 3 to 5,000 finite values, not all equal
 * @throws StatisticsError 'too-few', 'out-of-range' (more than 5,000), 'non-finite', 'constant'
 * Source: Royston 1995, Applied Statistics 44:547 (algorithm AS R94).
 */
export function shapiroWilk(values: ArrayLike<number>): { n: number; w: number; p: number } {
  const n = values.length
  if (n < 3) throw new StatisticsError('too-few', 'The Shapiro–Wilk test needs at least 3 values.')
  if (n > 5000) {
    throw new StatisticsError(
      'out-of-range',
      'The Shapiro–Wilk approximation holds up to 5,000 values; look at the histogram instead.',
    )
  }
  requireFinite(values, 'The values')
  const sorted = Float64Array.from(values).sort()
  const range = sorted[n - 1]! - sorted[0]!
  if (range === 0) throw new StatisticsError('constant', 'All values are equal.')
  const lack = lackOfFit(sorted, range, weights(n))
  return { n, w: 1 - lack, p: pValue(lack, n) }
}

/** Weights of the lower half of the order statistics, outermost first, positive. */
function weights(n: number): number[] {
  if (n === 3) return [Math.SQRT1_2]
  const half = Math.floor(n / 2)
  const scores = Array.from({ length: half }, (_, i) =>
    normalQuantile((i + 1 - 0.375) / (n + 0.25)),
  )
  const sumSquares = 2 * scores.reduce((sum, m) => sum + m * m, 0)
  const norm = Math.sqrt(sumSquares)
  const root = 1 / Math.sqrt(n)
  const first = polynomial(C1, root) - scores[0]! / norm
  const exact = n > 5 ? [first, polynomial(C2, root) - scores[1]! / norm] : [first]
  let left = sumSquares
  let right = 1
  exact.forEach((a, i) => {
    left -= 2 * scores[i]! ** 2
    right -= 2 * a * a
  })
  const scale = Math.sqrt(left / right)
  return scores.map((m, i) => exact[i] ?? -m / scale)
}

/** 1 − W, computed apart because W is often very near 1. */
function lackOfFit(sorted: Float64Array, range: number, a: number[]): number {
  const n = sorted.length
  let mean = 0
  for (const value of sorted) mean += value / range / n
  const weight = (i: number) => {
    const mirrored = n - 1 - i
    if (i === mirrored) return 0
    return i < mirrored ? -a[i]! : a[mirrored]!
  }
  let ssa = 0
  let ssx = 0
  let sax = 0
  for (let i = 0; i < n; i++) {
    const w = weight(i)
    const x = sorted[i]! / range - mean
    ssa += w * w
    ssx += x * x
    sax += w * x
  }
  const root = Math.sqrt(ssa * ssx)
  return ((root - sax) * (root + sax)) / (ssa * ssx)
}

function pValue(lack: number, n: number): number {
  if (n === 3) {
    const p = (6 / Math.PI) * (Math.asin(Math.sqrt(1 - lack)) - Math.asin(Math.sqrt(0.75)))
    return Math.min(1, Math.max(0, p))
  }
  if (lack <= 0) return 1
  const y = Math.log(lack)
  if (n <= 11) {
    const gamma = polynomial(G, n)
    if (y >= gamma) return 1e-99
    const mean = polynomial(C3, n)
    return normalUpperTail((-Math.log(gamma - y) - mean) / Math.exp(polynomial(C4, n)))
  }
  const logN = Math.log(n)
  return normalUpperTail((y - polynomial(C5, logN)) / Math.exp(polynomial(C6, logN)))
}

function polynomial(coefficients: number[], x: number): number {
  return coefficients.reduceRight((sum, c) => sum * x + c, 0)
}
