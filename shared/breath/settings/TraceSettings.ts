import type { InstrumentData } from './InstrumentData.ts'

/** What the protocol and the instrument's record say of one gas. All of it may be missing. */
export type AnalyteSettings = InstrumentData & {
  /** Room air measured apart from the trace; replaces the median found in it. */
  roomAirPpb: number
  roomAirStandardUncertaintyPpb: number
  /** Expanded uncertainty of the calibration, percent of the value, and its coverage factor. */
  calibrationExpandedPercent: number
  calibrationCoverage: number
  /** Smallest step of the display. */
  resolutionPpb: number
  /** Largest drift since calibration, ± percent of the value. */
  driftPercent: number
  /** Time constant for the optional inverse filter; at most `longestInverseFilterS`. */
  inverseFilterS: number
}

/** The last check of the sensor before the session; null where a part was not checked. */
export type SensorCheck = {
  zeroPassed: boolean | null
  spanPassed: boolean | null
  resonancePassed: boolean | null
  ageH: number | null
}

/** Every threshold between a raw trace and a session's result. Percentages are 0–100. */
export type TraceSettings = {
  subject: 'adult' | 'child'

  // Validation
  /** Longer steps in time are gaps: nothing is interpolated across them. */
  gapS: number
  slowestIntervalS: number
  lowestCo2Percent: number
  smallestCo2MaximumPercent: number
  largestCo2MaximumPercent: number
  longestDelayS: number
  mostSamples: number

  // Breaths, in percent of that breath's CO2 maximum
  edgePercent: number
  endPercent: number
  breathCo2Percent: number
  breathS: number
  breathFlowPercent: number
  inspiredPercentile: number

  // Plateau
  windowS: number
  deadSpaceMl: number
  deadSpaceChildMl: number
  /** Phase III needs this percentage of end-tidal CO2. */
  phaseThreePercent: number
  /** Dropped from the end of phase III where a valve disturbs it; 0 drops nothing. */
  valveArtefactS: number
  longestInverseFilterS: number
  /** Samples nearer than this to an exhalation are not room air. */
  roomAirDistanceS: number

  // Flags
  targetFlowMlS: number
  flowTolerancePercent: number
  flowOutsidePercent: number
  flowMeanTolerancePercent: number
  lowestPressureCmH2o: number
  highestPressureCmH2o: number
  pressureOutsideS: number
  shortestS: number
  shortestChildS: number
  /** Adults' exhalations shorter than this warn. */
  shortS: number
  co2VeryLowPercent: number
  co2LowPercent: number
  co2HighPercent: number
  rebreatheRejectPercent: number
  rebreatheWarnPercent: number
  restS: number
  slopePercent: number
  /** Gases whose reading a steep plateau rejects; the others get a warning. */
  slopeRejects: readonly string[]
  ambientRatio: number
  ambientExempt: readonly string[]
  /** Response time beyond duration / divisor rejects or warns. */
  lagRejectDivisor: number
  lagWarnDivisor: number
  sensorCheck: SensorCheck | null
  sensorCheckAgeH: number

  // Volume, normalisation
  barometricPressureKpa: number
  referenceCo2Percent: number
  alveolarCo2Percent: number
  /** Gases for which the protocol asks for normalisation to CO2, and for dilution correction. */
  normalise: readonly string[]
  correctDilution: readonly string[]
  /** Gases for which either is refused. */
  neverNormalise: readonly string[]

  // Session
  sessionRule: 'median' | 'pair'
  fewestAccepted: number
  agreePercent: number
  /** Gases whose low values agree within an absolute difference instead, and how low. */
  agreePpbGases: readonly string[]
  agreePpb: number
  agreePpbBelow: number
  coverage: number

  /** By the gas's name in snake case, such as nitric_oxide. */
  analytes: Readonly<Record<string, Partial<AnalyteSettings>>>
}
