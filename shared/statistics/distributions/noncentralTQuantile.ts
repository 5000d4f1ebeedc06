import { requireProbability } from '../requireProbability.ts'
import { gaussLegendre } from './gaussLegendre.ts'
import { logGamma } from './logGamma.ts'
import { normalCdf } from './normalCdf.ts'
import { solveQuantile } from './solveQuantile.ts'

type Node = { s: number; weight: number }

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
  const at = (t: number) => {
    let cdf = 0
    let slope = 0
    for (const { s, weight } of nodesFor(degreesOfFreedom, noncentrality, t)) {
      const z = t * s - noncentrality
      const mass = weight * density(s)
      cdf += mass * normalCdf(z)
      slope += (mass * s * Math.exp((-z * z) / 2)) / Math.sqrt(2 * Math.PI)
    }
    return { excess: cdf - p, density: slope }
  }
  // Student's mean-shift guess; the bracket grows until it holds the answer
  const guess = noncentrality * (1 + 3 / (4 * degreesOfFreedom))
  let lower = -10
  let upper = guess + 10
  while (at(lower).excess > 0) lower *= 4
  while (at(upper).excess < 0) upper *= 4
  return solveQuantile(at, { lower, upper }, guess)
}

/** Density of s = √(χ²/df): 2 (df/2)^(df/2) s^(df−1) exp(−df s²/2) / Γ(df/2). */
function chiDensity(df: number): (s: number) => number {
  const logConstant = Math.LN2 + (df / 2) * Math.log(df / 2) - logGamma(df / 2)
  return (s) => (s <= 0 ? 0 : Math.exp(logConstant + (df - 1) * Math.log(s) - (df * s * s) / 2))
}

function nodesFor(df: number, noncentrality: number, t: number): Node[] {
  const spread = 1 / Math.sqrt(2 * df)
  const lower = Math.max(0, 1 - 12 * spread)
  const upper = 1 + 12 * spread
  const edges = new Set<number>()
  const panels = 24
  for (let k = 0; k <= panels; k++) edges.add(lower + ((upper - lower) * k) / panels)
  if (t !== 0) {
    const centre = noncentrality / t
    const reach = Math.abs(8 / t)
    for (let k = -8; k <= 8; k++) {
      const edge = centre + (reach * k) / 8
      if (edge > lower && edge < upper) edges.add(edge)
    }
  }
  const sorted = [...edges].sort((a, b) => a - b)
  const nodes: Node[] = []
  for (let k = 1; k < sorted.length; k++) {
    const half = (sorted[k]! - sorted[k - 1]!) / 2
    const middle = (sorted[k]! + sorted[k - 1]!) / 2
    for (const { node, weight } of gaussLegendre(16)) {
      nodes.push({ s: middle + half * node, weight: half * weight })
    }
  }
  return nodes
}
