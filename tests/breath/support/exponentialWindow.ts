/** y(t) = level + size·e^(−t/tau) + drift·t, sampled at first, first + step, … (n samples). */
export type Curve = { level: number; size: number; tau: number; drift: number }
export type Sampling = { first: number; step: number; n: number }

/**
 * Mean and least-squares slope of the samples, from the sums of geometric series: no sample is made.
 * Σqᵏ = (1 − qⁿ)/(1 − q), Σk·qᵏ = q(1 − n·qⁿ⁻¹ + (n − 1)qⁿ)/(1 − q)², Σ(k − k̄)² = n(n² − 1)/12.
 */
export function exponentialWindow(
  { level, size, tau, drift }: Curve,
  { first, step, n }: Sampling,
): { mean: number; slope: number } {
  const q = Math.exp(-step / tau)
  const start = size * Math.exp(-first / tau)
  const middle = (n - 1) / 2
  const powers = (1 - q ** n) / (1 - q)
  const ranked = (q * (1 - n * q ** (n - 1) + (n - 1) * q ** n)) / (1 - q) ** 2
  const rankSquares = (n * (n * n - 1)) / 12
  return {
    mean: level + (start * powers) / n + drift * (first + middle * step),
    slope: (start * (ranked - middle * powers)) / (step * rankSquares) + drift,
  }
}
