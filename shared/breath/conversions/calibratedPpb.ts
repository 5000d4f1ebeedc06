/** A calibration line, signal = zero + slope · concentration, and a factor for its conditions. */
export type CalibrationLine = { zero: number; slopePerPpb: number; correction?: number }

/** Concentration in ppb of a signal: (S − S_zero)/slope · correction. */
export function calibratedPpb(signal: number, line: CalibrationLine): number {
  return ((signal - line.zero) / line.slopePerPpb) * (line.correction ?? 1)
}
