import { normalCdf } from '../distributions/normalCdf.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import type { NotDefined } from '../NotDefined.ts'
import type { RocCurve } from './rocCurve.ts'

export type BinormalCurve = {
  /** probit(specificity) = intercept + slope·probit(sensitivity) */
  intercept: number | null
  slope: number | null
  area: number | null
  notDefined: NotDefined | null
}

/**
 * A smooth binormal curve through the empirical points: a least-squares line on probit scales over the
 * points strictly inside; area Φ(intercept/√(1 + slope²)). A description, without an interval.
 * Source: Hanley 1988, Med Decis Making 8:197; as in the smoothing of Robin et al 2011, BMC Bioinformatics 12:77.
 */
export function binormalCurve(curve: RocCurve): BinormalCurve {
  const { truePositives, falsePositives, nPresent, nAbsent } = curve
  const x: number[] = []
  const y: number[] = []
  for (let k = 0; k < truePositives.length; k++) {
    const tp = truePositives[k]!
    const tn = nAbsent - falsePositives[k]!
    if (tp === 0 || tp === nPresent || tn === 0 || tn === nAbsent) continue
    x.push(normalQuantile(tp / nPresent))
    y.push(normalQuantile(tn / nAbsent))
  }
  const line = throughPoints(x, y)
  if (line === null) {
    const sentence =
      'Fewer than two points lie inside the curve, so no line can be put through them.'
    return { intercept: null, slope: null, area: null, notDefined: { code: 'too-few', sentence } }
  }
  const area = normalCdf(line.intercept / Math.sqrt(1 + line.slope * line.slope))
  return { ...line, area, notDefined: null }
}

function throughPoints(x: number[], y: number[]): { intercept: number; slope: number } | null {
  const meanX = x.reduce((a, b) => a + b, 0) / x.length
  const meanY = y.reduce((a, b) => a + b, 0) / y.length
  let xx = 0
  let xy = 0
  for (let i = 0; i < x.length; i++) {
    xx += (x[i]! - meanX) ** 2
    xy += (x[i]! - meanX) * (y[i]! - meanY)
  }
  if (x.length < 2 || xx < 1e-20) return null
  const slope = xy / xx
  return { intercept: meanY - slope * meanX, slope }
}
