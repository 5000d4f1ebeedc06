/** What a standard was certified as, or what the sensor said, with its unit where it has one. */
export interface CalibrationAxis {
  label: string
  unit?: string
}

export interface CalibrationReading {
  level: number
  signal: number
}

/** The level that a signal points to, with its limits where they are bounded. */
export interface FoundLevel {
  signal: number
  level: number
  interval: { lower: number; upper: number } | null
}

export const calibrationAxisLabel = ({ label, unit }: CalibrationAxis): string =>
  unit ? `${label} (${unit})` : label
