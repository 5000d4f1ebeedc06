import { StatisticsError } from '../StatisticsError.ts'

export type DetectionLimit = { sigma: number; detection: number; quantitation: number }

export type DetectionLimits = {
  fromResidualSd: DetectionLimit
  fromInterceptError: DetectionLimit
  /** Null without blanks. */
  fromBlanks: DetectionLimit | null
}

/**
 * Limits of detection (3.3·σ/slope) and quantitation (10·σ/slope) with σ taken three ways: residual SD
 * of the calibration, standard error of its intercept, SD of blank readings. Name the way beside them.
 * The residual SD of a weighted line is in units of signal·√weight: do not use it there.
 * @param line intercept's SE, residual SD (signal units) and slope  @param blankSd SD of blank signals
 * @throws StatisticsError 'constant' (a slope of 0)
 * Source: ICH Q2(R2) 2023, section on detection and quantitation limits.
 */
export function detectionLimits(
  line: { slope: number; residualSd: number; interceptStandardError: number },
  blankSd?: number,
): DetectionLimits {
  if (line.slope === 0) throw new StatisticsError('constant', 'The line has no slope.')
  const from = (sigma: number): DetectionLimit => ({
    sigma,
    detection: (3.3 * sigma) / Math.abs(line.slope),
    quantitation: (10 * sigma) / Math.abs(line.slope),
  })
  return {
    fromResidualSd: from(line.residualSd),
    fromInterceptError: from(line.interceptStandardError),
    fromBlanks: blankSd === undefined ? null : from(blankSd),
  }
}
