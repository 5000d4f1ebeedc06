import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type AllanPoint = {
  /** Averaging length in readings and in seconds. */
  m: number
  tauS: number
  deviation: number
  /** Squared differences averaged. */
  terms: number
}

/**
 * Allan deviation of a series of readings over averaging lengths (octaves unless given): how much a mean
 * over τ still differs from the next one. White noise falls with slope −½; the minimum is the longest
 * useful average.
 * @param readings at least 3, evenly spaced  @param options `intervalS` between readings (1 s unless
 * given); `overlapping` uses every start (the better estimate, and the one unless told otherwise)
 * @throws StatisticsError 'too-few', 'non-finite', 'out-of-range' (a length without a term)
 * Source: Allan 1966, Proc IEEE 54:221; overlapping as in NIST SP 1065 (Riley 2008), eq. 10 and 11.
 */
export function allanDeviation(
  readings: ArrayLike<number>,
  {
    intervalS = 1,
    overlapping = true,
    lengths = octaves(readings.length),
  }: { intervalS?: number; overlapping?: boolean; lengths?: ArrayLike<number> } = {},
): AllanPoint[] {
  const n = readings.length
  if (n < 3) throw new StatisticsError('too-few', 'An Allan deviation needs at least 3 readings.')
  if (!(intervalS > 0)) throw new StatisticsError('out-of-range', 'The interval lies above 0 s.')
  requireFinite(readings, 'The readings')
  const phase = cumulative(readings)
  return Array.from(lengths, (m) => {
    if (!Number.isSafeInteger(m) || m < 1 || 2 * m > n) {
      throw new StatisticsError('out-of-range', `A length of ${m} readings does not fit twice.`)
    }
    const { squares, terms } = secondDifferences(phase, m, overlapping ? 1 : m)
    return { m, tauS: m * intervalS, deviation: Math.sqrt(squares / (2 * m * m * terms)), terms }
  })
}

/** 1, 2, 4, … as long as two averages fit. */
function octaves(n: number): number[] {
  const lengths: number[] = []
  for (let m = 1; 2 * m <= n; m *= 2) lengths.push(m)
  return lengths
}

/** Sums of the readings less their mean (which second differences do not see), from 0. */
function cumulative(readings: ArrayLike<number>): Float64Array {
  const n = readings.length
  let mean = 0
  for (let i = 0; i < n; i++) mean += readings[i]! / n
  const phase = new Float64Array(n + 1)
  for (let i = 0; i < n; i++) phase[i + 1] = phase[i]! + (readings[i]! - mean)
  return phase
}

function secondDifferences(phase: Float64Array, m: number, step: number) {
  let squares = 0
  let terms = 0
  for (let i = 0; i + 2 * m < phase.length; i += step) {
    const difference = phase[i + 2 * m]! - 2 * phase[i + m]! + phase[i]!
    squares += difference * difference
    terms++
  }
  return { squares, terms }
}
