import type { Uncertainty } from '../TraceResult.ts'

/** What a session's uncertainty is made of; all parts nought or more. */
export type UncertaintyBudget = {
  /** The session's value, and what the accepted readings say of its scatter. */
  valuePpb: number
  n: number
  sdPpb: number
  /** Expanded uncertainty of the calibration in percent of the value, and its coverage factor. */
  calibrationExpandedPercent: number
  calibrationCoverage?: number
  resolutionPpb?: number
  /** Largest drift since calibration, ± percent of the value. */
  driftPercent?: number
  /** Standard uncertainties of the room air subtracted and of the normalisation to CO2. */
  roomAirStandardUncertaintyPpb?: number
  co2StandardUncertaintyPpb?: number
  /** Coverage factor of the answer. */
  coverage?: number
}

/**
 * Uncertainty of a session's value: u² = s²/n + (U_cal/k)² + resolution²/12 + drift²/3 (+ room air²,
 * + CO2²). The calibration is shared by all sessions: it does not average down across subjects.
 * Source: JCGM 100:2008 (GUM), 4.3, 5.1.2 and G.4.
 */
export function expandedUncertainty(budget: UncertaintyBudget): Uncertainty {
  const { n, calibrationCoverage = 2, coverage = 2 } = budget
  const size = Math.abs(budget.valuePpb)
  const repeatabilityPpb = budget.sdPpb / Math.sqrt(n)
  const calibrationPpb = (size * budget.calibrationExpandedPercent) / 100 / calibrationCoverage
  const resolutionPpb = (budget.resolutionPpb ?? 0) / Math.sqrt(12)
  const driftPpb = (size * (budget.driftPercent ?? 0)) / 100 / Math.sqrt(3)
  const roomAirPpb = budget.roomAirStandardUncertaintyPpb ?? 0
  const co2Ppb = budget.co2StandardUncertaintyPpb ?? 0
  const combinedPpb = Math.hypot(
    repeatabilityPpb,
    calibrationPpb,
    resolutionPpb,
    driftPpb,
    roomAirPpb,
    co2Ppb,
  )
  return {
    repeatabilityPpb,
    calibrationPpb,
    resolutionPpb,
    driftPpb,
    roomAirPpb,
    co2Ppb,
    combinedPpb,
    degreesOfFreedom:
      repeatabilityPpb === 0 ? null : (n - 1) * (combinedPpb / repeatabilityPpb) ** 4,
    coverage,
    expandedPpb: coverage * combinedPpb,
  }
}
