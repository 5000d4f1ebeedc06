import { fQuantile } from '../distributions/fQuantile.ts'
import { fUpperTail } from '../distributions/fUpperTail.ts'
import type { LevelOption } from '../Interval.ts'
import { requireFinite } from '../requireFinite.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type IntraclassCorrelation = {
  /** Null where the variances that it divides by come to 0. */
  estimate: number | null
  /** Null where the F ratio has no bound (no error left at all). */
  lower: number | null
  upper: number | null
  f: number | null
  df1: number
  df2: number
  p: number | null
}

/** Single measures, and means of the k measures. 1: raters differ from subject to subject; 2: raters are
 * a random sample, absolute agreement; 3: these raters only, consistency. */
export type IntraclassCorrelations = {
  single1: IntraclassCorrelation
  single2: IntraclassCorrelation
  single3: IntraclassCorrelation
  mean1: IntraclassCorrelation
  mean2: IntraclassCorrelation
  mean3: IntraclassCorrelation
}

/**
 * The six intraclass correlations of n subjects each measured once by the same k methods.
 * @param table n ≥ 2 rows of k ≥ 2 finite values
 * @throws StatisticsError 'too-few', 'unequal-length', 'non-finite', 'constant'
 * Source: Shrout & Fleiss 1979, Psychol Bull 86:420; intervals McGraw & Wong 1996, Psychol Methods 1:30.
 */
export function intraclassCorrelations(
  table: ArrayLike<number>[],
  { level = 0.95 }: LevelOption = {},
): IntraclassCorrelations {
  requireProbability(level, 'The confidence level')
  const squares = meanSquares(table)
  const { n, k, msb, msw, msj, mse } = squares
  if (msb + msw === 0) throw new StatisticsError('constant', 'All values are equal.')
  const tail = 1 - (1 - level) / 2
  const oneWay = { df1: n - 1, df2: n * (k - 1) }
  const twoWay = { df1: n - 1, df2: (n - 1) * (k - 1) }
  const f1 = ratioTest(msb, msw, oneWay, tail)
  const f3 = ratioTest(msb, mse, twoWay, tail)
  const single2 = ratio(msb - mse, msb + (k - 1) * mse + (k * (msj - mse)) / n)
  const interval2 = agreementInterval(squares, single2, tail)
  const ofMean = (r: number | null) => (r === null ? null : ratio(k * r, 1 + (k - 1) * r))
  const single = (f: number | null) => (f === null ? null : ratio(f - 1, f + k - 1))
  const mean = (f: number | null) => (f === null ? null : ratio(f - 1, f))
  const build = (
    estimate: number | null,
    test: ReturnType<typeof ratioTest>,
    lower: number | null,
    upper: number | null,
  ) => ({ estimate, lower, upper, f: test.f, df1: test.df1, df2: test.df2, p: test.p })
  return {
    single1: build(ratio(msb - msw, msb + (k - 1) * msw), f1, single(f1.low), single(f1.high)),
    single2: build(single2, f3, interval2.lower, interval2.upper),
    single3: build(ratio(msb - mse, msb + (k - 1) * mse), f3, single(f3.low), single(f3.high)),
    mean1: build(ratio(msb - msw, msb), f1, mean(f1.low), mean(f1.high)),
    mean2: build(
      ratio(msb - mse, msb + (msj - mse) / n),
      f3,
      ofMean(interval2.lower),
      ofMean(interval2.upper),
    ),
    mean3: build(ratio(msb - mse, msb), f3, mean(f3.low), mean(f3.high)),
  }
}

/** Null where the denominator is 0, or so small that rounding made it. */
function ratio(numerator: number, denominator: number): number | null {
  const value = numerator / denominator
  return Math.abs(value) < 1e12 ? value : null
}

type MeanSquares = {
  n: number
  k: number
  msb: number
  msw: number
  msj: number
  mse: number
}

function meanSquares(table: ArrayLike<number>[]): MeanSquares {
  const n = table.length
  const k = table[0]?.length ?? 0
  if (n < 2 || k < 2) {
    throw new StatisticsError('too-few', 'At least 2 subjects and 2 measures are needed.')
  }
  for (const row of table) {
    if (row.length !== k) {
      throw new StatisticsError('unequal-length', 'Each subject needs a value by every method.')
    }
    requireFinite(row, 'The measures')
  }
  const rowMeans = table.map((row) => sum(k, (j) => row[j]!) / k)
  const columnMeans = Array.from({ length: k }, (_, j) => sum(n, (i) => table[i]![j]!) / n)
  const grand = sum(n, (i) => rowMeans[i]!) / n
  const between = k * sum(n, (i) => (rowMeans[i]! - grand) ** 2)
  const methods = n * sum(k, (j) => (columnMeans[j]! - grand) ** 2)
  const within = sum(n, (i) => sum(k, (j) => (table[i]![j]! - rowMeans[i]!) ** 2))
  const residual = sum(n, (i) =>
    sum(k, (j) => (table[i]![j]! - rowMeans[i]! - columnMeans[j]! + grand) ** 2),
  )
  return {
    n,
    k,
    msb: between / (n - 1),
    msw: within / (n * (k - 1)),
    msj: methods / (k - 1),
    mse: residual / ((n - 1) * (k - 1)),
  }
}

function sum(count: number, term: (index: number) => number): number {
  let total = 0
  for (let i = 0; i < count; i++) total += term(i)
  return total
}

function ratioTest(above: number, below: number, df: { df1: number; df2: number }, tail: number) {
  if (below === 0) return { ...df, f: null, low: null, high: null, p: null }
  const f = above / below
  return {
    ...df,
    f,
    low: f / fQuantile(tail, df.df1, df.df2),
    high: f * fQuantile(tail, df.df2, df.df1),
    p: fUpperTail(f, df.df1, df.df2),
  }
}

/** McGraw & Wong's interval for absolute agreement, with Satterthwaite degrees of freedom. */
function agreementInterval(squares: MeanSquares, icc: number | null, tail: number) {
  const { n, k, msb, msj, mse } = squares
  if (icc === null || mse === 0) return { lower: null, upper: null }
  const a = k * icc * (msj / mse)
  const b = n * (1 + (k - 1) * icc) - k * icc
  const v = ((k - 1) * (n - 1) * (a + b) ** 2) / ((n - 1) * a * a + b * b)
  // with hardly a degree of freedom the F quantile is beyond all bounds
  if (!(v > 0.01) || !Number.isFinite(v)) return { lower: null, upper: null }
  const spread = k * msj + (k * n - k - n) * mse
  const low = fQuantile(tail, n - 1, v)
  const high = fQuantile(tail, v, n - 1)
  return {
    lower: ratio(n * (msb - low * mse), low * spread + n * msb),
    upper: ratio(n * (high * msb - mse), spread + n * high * msb),
  }
}
