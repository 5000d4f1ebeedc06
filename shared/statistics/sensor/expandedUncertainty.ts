import { moments } from '../description/moments.ts'
import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'

/** What a session's uncertainty is made of; every part in the readings' unit unless named percent. */
export type UncertaintyBudget = {
  /** Expanded uncertainty of the calibration in percent of the value, and its coverage factor. */
  calibrationPercent: number
  calibrationCoverage?: number
  /** Smallest step of the display. */
  resolution: number
  /** Largest drift since calibration, ± percent of the value. */
  driftPercent: number
  /** Room air subtracted, and its standard uncertainty. */
  ambient?: { mean: number; standardUncertainty: number }
  /** Coverage factor of the answer, 2 unless given. */
  coverage?: number
}

export type ExpandedUncertainty = {
  /** Mean of the exhalations, less room air where given. */
  value: number
  repeatability: number
  calibration: number
  resolution: number
  drift: number
  ambient: number
  combined: number
  /** Welch–Satterthwaite, from the repeatability alone; null where the exhalations do not differ. */
  degreesOfFreedom: number | null
  coverage: number
  expanded: number
}

/**
 * Expanded uncertainty of a session's mean: u² = s²/n + (U_cal/k)² + resolution²/12 + drift²/3
 * (+ room air²). The calibration is shared by all sessions: it does not average down across subjects.
 * @param exhalations n ≥ 2 finite values of one session
 * @throws StatisticsError 'too-few', 'non-finite', 'out-of-range'
 * Source: JCGM 100:2008 (GUM), sections 4.3, 5.1.2 and G.4.
 */
export function expandedUncertainty(
  exhalations: ArrayLike<number>,
  budget: UncertaintyBudget,
): ExpandedUncertainty {
  if (exhalations.length < 2) {
    throw new StatisticsError('too-few', 'The spread of a session needs at least two exhalations.')
  }
  requireFinite(exhalations, 'The exhalations')
  const { calibrationPercent, calibrationCoverage = 2, driftPercent, coverage = 2 } = budget
  const parts = [calibrationPercent, budget.resolution, driftPercent]
  if (!parts.every((part) => part >= 0) || !(calibrationCoverage > 0) || !(coverage > 0)) {
    throw new StatisticsError('out-of-range', 'Parts of the budget cannot be negative.')
  }
  const { n, mean, sd } = moments(exhalations)
  const size = Math.abs(mean)
  const repeatability = sd / Math.sqrt(n)
  const calibration = (size * calibrationPercent) / 100 / calibrationCoverage
  const resolution = budget.resolution / Math.sqrt(12)
  const drift = (size * driftPercent) / 100 / Math.sqrt(3)
  const ambient = budget.ambient?.standardUncertainty ?? 0
  const combined = Math.hypot(repeatability, calibration, resolution, drift, ambient)
  return {
    value: mean - (budget.ambient?.mean ?? 0),
    repeatability,
    calibration,
    resolution,
    drift,
    ambient,
    combined,
    degreesOfFreedom: repeatability === 0 ? null : combined ** 4 / (repeatability ** 4 / (n - 1)),
    coverage,
    expanded: coverage * combined,
  }
}
