import { requireProbability } from '../requireProbability.ts'
import { gaussLegendre } from './gaussLegendre.ts'
import { logGamma } from './logGamma.ts'
import { normalCdf } from './normalCdf.ts'
import { normalQuantile } from './normalQuantile.ts'
import { solveQuantile } from './solveQuantile.ts'

/** Panels over the range of s, each of 1.5 standard deviations. */
const PANELS = 16

/**
 * The t with P(T ≤ t) = p for the noncentral t distribution (jStat's is a series that fails for large
 * noncentrality). P(T ≤ t) = ∫ Φ(t·s − δ) f(s) ds, where s = √(χ²/df); integrated by panels of
 * Gauss–Legendre points over the range of s and, finer, where Φ turns; then solved by Newton steps.
 * @param p strictly between 0 and 1  @param noncentrality δ ≥ 0
 * @throws StatisticsError 'out-of-range', 'no-convergence'
 * Source: Johnson, Kotz & Balakrishnan 1995, Continuous Univariate Distributions 2, ch. 31.
 */
export function noncentralTQuantile(
  p: number,
  degreesOfFreedom: number,
  noncentrality: number,
): number {
  requireProbability(p, 'A probability')
  const density = chiDensity(degreesOfFreedom)
  const rule = gaussLegendre(16)
  const at = (t: number) => {
    const edges = panelEdges(degreesOfFreedom, noncentrality, t)
    let cdf = 0
    let slope = 0
    for (let k = 1; k < edges.length; k++) {
      const half = (edges[k]! - edges[k - 1]!) / 2
      const middle = (edges[k]! + edges[k - 1]!) / 2
      for (const { node, weight } of rule) {
        const s = middle + half * node
        const z = t * s - noncentrality
        const mass = half * weight * density(s)
        cdf += mass * normalCdf(z)
        slope += (mass * s * Math.exp((-z * z) / 2)) / Math.sqrt(2 * Math.PI)
      }
    }
    return { excess: cdf - p, density: slope }
  }
  const guess = firstGuess(p, degreesOfFreedom, noncentrality)
  let lower = Math.min(-10, 2 * guess)
  let upper = Math.max(10, 2 * guess)
  while (at(lower).excess > 0) lower *= 4
  while (at(upper).excess < 0) upper *= 4
  return solveQuantile(at, { lower, upper }, guess)
}

/** Density of s = √(χ²/df): 2 (df/2)^(df/2) s^(df−1) exp(−df s²/2) / Γ(df/2). */
function chiDensity(df: number): (s: number) => number {
  const logConstant = Math.LN2 + (df / 2) * Math.log(df / 2) - logGamma(df / 2)
  return (s) => (s <= 0 ? 0 : Math.exp(logConstant + (df - 1) * Math.log(s) - (df * s * s) / 2))
}

/** The normal approximation of Johnson & Welch 1940 where it holds, else the mean. */
function firstGuess(p: number, df: number, noncentrality: number): number {
  const z = normalQuantile(p)
  const shrink = 1 - (z * z) / (2 * df)
  if (shrink < 0.3) return noncentrality * (1 + 3 / (4 * df))
  const root = Math.sqrt(shrink + (noncentrality * noncentrality) / (2 * df))
  return (noncentrality + z * root) / shrink
}

function panelEdges(df: number, noncentrality: number, t: number): number[] {
  const spread = 1 / Math.sqrt(2 * df)
  const lower = Math.max(0, 1 - 12 * spread)
  const upper = 1 + 12 * spread
  const width = (upper - lower) / PANELS
  const edges: number[] = []
  for (let k = 0; k <= PANELS; k++) edges.push(lower + width * k)
  const turn = Math.abs(1 / t)
  if (width < 3 * turn) return edges
  // Φ turns within few panels: give the turn panels of its own
  for (let k = -4; k <= 4; k++) {
    const edge = noncentrality / t + 2 * turn * k
    if (edge > lower && edge < upper) edges.push(edge)
  }
  return edges.sort((a, b) => a - b)
}
