/**
 * What a pilot study says about two areas on the same subjects (see pairedDelong): DeLong variances and
 * covariance at its own numbers. `variance1` belongs to the reference curve.
 */
export type PilotComparison = {
  area1: number
  area2: number
  variance1: number
  variance2: number
  covariance: number
  nPresent: number
  nAbsent: number
}
