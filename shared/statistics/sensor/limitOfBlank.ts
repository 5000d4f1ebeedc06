import { quantile } from '../description/quantile.ts'
import { summariseValues } from '../description/summariseValues.ts'
import { normalQuantile } from '../distributions/normalQuantile.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type LimitOfBlank = {
  blank: { n: number; mean: number; sd: number; percentile95: number }
  low: { n: number; mean: number; sd: number }
  /** mean(blank) + 1.645·SD(blank), and with Φ⁻¹(0.95) in full. */
  limitOfBlank: number
  limitOfBlankFullZ: number
  /** LoB + 1.645·SD(low), and with Φ⁻¹(0.95) in full. */
  limitOfDetection: number
  limitOfDetectionFullZ: number
  /** c = 1.645/(1 − 1/(4·df)), df = n − 1, for the low samples alone and for both. */
  limitOfDetectionSmallSample: number
  limitOfBlankBothSmallSample: number
  limitOfDetectionBothSmallSample: number
}

/**
 * Limit of blank and of detection from blank and low-level readings, classical and with the correction
 * for small samples; in the unit of the readings.
 * @param blanks, low at least two finite readings each
 * @throws StatisticsError 'too-few', 'non-finite'
 * Source: CLSI EP17-A2 (2012); Armbruster & Pry 2008, Clin Biochem Rev 29 Suppl 1:S49.
 */
export function limitOfBlank(blanks: ArrayLike<number>, low: ArrayLike<number>): LimitOfBlank {
  if (blanks.length < 2 || low.length < 2) {
    throw new StatisticsError('too-few', 'At least two blank and two low readings are needed.')
  }
  const b = summariseValues(blanks)
  const l = summariseValues(low)
  const blankSd = b.sd!
  const lowSd = l.sd!
  const z = 1.645
  const fullZ = normalQuantile(0.95)
  const corrected = (n: number) => z / (1 - 1 / (4 * (n - 1)))
  const lob = b.mean + z * blankSd
  const lobFullZ = b.mean + fullZ * blankSd
  const lobSmall = b.mean + corrected(b.n) * blankSd
  return {
    blank: {
      n: b.n,
      mean: b.mean,
      sd: blankSd,
      percentile95: quantile(Float64Array.from(blanks).sort(), 0.95),
    },
    low: { n: l.n, mean: l.mean, sd: lowSd },
    limitOfBlank: lob,
    limitOfBlankFullZ: lobFullZ,
    limitOfDetection: lob + z * lowSd,
    limitOfDetectionFullZ: lobFullZ + fullZ * lowSd,
    limitOfDetectionSmallSample: lob + corrected(l.n) * lowSd,
    limitOfBlankBothSmallSample: lobSmall,
    limitOfDetectionBothSmallSample: lobSmall + corrected(l.n) * lowSd,
  }
}
