import { normalQuantile } from '../distributions/normalQuantile.ts'

/**
 * Variance of an area times the number present, under a binormal model:
 * 0.0099·exp(−a²/2)·((5a² + 8) + (a² + 8)/k), a = 1.414·Φ⁻¹(area).
 * @param k absent per present subject
 * Source: Obuchowski 2004, Acad Radiol 11:1178 (constants as printed there).
 */
export function obuchowskiVariance(area: number, k: number): number {
  // biome-ignore lint/suspicious/noApproximativeNumericConstant: the constant as printed, which published sample sizes rest on
  const a = 1.414 * normalQuantile(area)
  const square = a * a
  return 0.0099 * Math.exp(-square / 2) * (5 * square + 8 + (square + 8) / k)
}
