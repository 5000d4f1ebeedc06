/** A prong as a clamped beam. */
export type Prong = {
  lengthMm: number
  /** Along the vibration. */
  thicknessMm: number
  elasticModulusGpa: number
  densityKgM3: number
}

/** Least root of cos x · cosh x = −1. */
const FIRST_ROOT = 1.8751040687119611

/**
 * Resonance in Hz of a tuning fork's prong, f = (x²/2π)·√(E·I/(ρ·A))/L² with I/A = thickness²/12.
 * An ideal clamped beam: a check of order, not a prediction.
 * Source: Euler–Bernoulli beam theory, textbook.
 */
export function tuningForkFrequencyHz(prong: Prong): number {
  const thicknessM = prong.thicknessMm / 1000
  const lengthM = prong.lengthMm / 1000
  const speed = Math.sqrt((prong.elasticModulusGpa * 1e9) / prong.densityKgM3)
  return ((FIRST_ROOT ** 2 / (2 * Math.PI)) * speed * thicknessM) / Math.sqrt(12) / lengthM ** 2
}
