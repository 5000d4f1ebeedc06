export type WindowFigures = {
  n: number
  mean: number
  /** n − 1; null for one sample. */
  sd: number | null
  /** Ordinary least squares on time, per second; null for one sample. */
  slope: number | null
}

/**
 * Mean, spread and slope of the samples [from, to); null where there are none, or where any is
 * not a number.
 */
export function windowFigures(
  timeS: Float64Array,
  values: Float64Array,
  from: number,
  to: number,
): WindowFigures | null {
  const n = to - from
  if (n < 1) return null
  // Both as differences from the first sample: a channel that stands still has its own value as mean,
  // and instants since 1970 do not cost the slope its digits.
  const firstValue = values[from]!
  let valueSum = 0
  let timeSum = 0
  for (let i = from; i < to; i++) {
    valueSum += values[i]! - firstValue
    timeSum += timeS[i]! - timeS[from]!
  }
  const mean = firstValue + valueSum / n
  const meanTime = timeSum / n
  let squares = 0
  let products = 0
  let timeSquares = 0
  for (let i = from; i < to; i++) {
    const off = values[i]! - mean
    const time = timeS[i]! - timeS[from]! - meanTime
    squares += off * off
    products += off * time
    timeSquares += time * time
  }
  if (!Number.isFinite(squares) || !Number.isFinite(products)) return null
  return {
    n,
    mean,
    sd: n > 1 ? Math.sqrt(squares / (n - 1)) : null,
    slope: timeSquares > 0 ? products / timeSquares : null,
  }
}
