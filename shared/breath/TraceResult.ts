import type { InstrumentData } from './settings/InstrumentData.ts'
import type { Recording } from './TraceColumns.ts'

export type FlagName =
  | 'FLOW'
  | 'PRESS'
  | 'DUR'
  | 'CO2_LOW'
  | 'CO2_HIGH'
  | 'REBREATHE'
  | 'REST'
  | 'PLATEAU_SHORT'
  | 'PLATEAU_SLOPE'
  | 'AMBIENT'
  | 'RANGE'
  | 'LAG'
  | 'SENSOR'

/** What exactly a flag found; words for people are made from it. */
export type FlagCause =
  | 'flow-outside'
  | 'flow-mean'
  | 'pressure-outside'
  | 'too-short'
  | 'short'
  | 'co2-low'
  | 'co2-high'
  | 'inspired-co2'
  | 'rest-short'
  | 'phase-three-short'
  | 'plateau-slope'
  | 'near-room-air'
  | 'saturated'
  | 'gap'
  | 'cut-off'
  | 'incomplete'
  | 'below-detection'
  | 'slow-response'
  | 'check-failed'
  | 'check-old'

export type Flag = {
  name: FlagName
  cause: FlagCause
  severity: 'reject' | 'warn'
  /** The gas whose reading it concerns; null where it concerns the exhalation. */
  analyte: string | null
  /** What was found and the limit it broke, both in `unit`; null where there is no number. */
  value: number | null
  limit: number | null
  unit: '%' | 's' | 'ppb' | 'mL/s' | 'h' | 'checks'
}

/** A value that the protocol may ask for; `why` says what stood in the way of it. */
export type Adjusted =
  | { ppb: number; why: null }
  | { ppb: null; why: 'not-asked' | 'never-for-this-gas' | 'not-computable' }

/** One gas in one exhalation. All figures are null where the plateau window is not full. */
export type Reading = {
  analyte: string
  /** Samples in the window. */
  n: number
  meanPpb: number | null
  medianPpb: number | null
  /** n − 1; null for a single sample. */
  sdPpb: number | null
  /** Ordinary least squares. */
  slopePpbPerS: number | null
  /** 100 · slope · window / mean. */
  changePercent: number | null
  /** (slope / flow) / mean, per litre exhaled. */
  normalisedSlopePerL: number | null
  /** Mean after the inverse filter, where the protocol asks for it. */
  inverseFilteredMeanPpb: number | null
  /** The mean lies below the limit of detection; it is kept as measured. */
  censored: boolean
  /** Mean less room air. */
  gradientPpb: number | null
  co2Normalised: Adjusted
  dilutionCorrected: Adjusted
  /** The exhalation is accepted, the window was full and no flag rejects this gas. */
  accepted: boolean
}

/** The plateau window: samples with startS ≤ t < endS. */
export type PlateauWindow = {
  startS: number
  endS: number
  n: number
  meanCo2Percent: number
  co2SlopePercentPerS: number | null
  meanFlowMlS: number | null
}

export type Exhalation = {
  /** From 1 in the order of the trace. */
  number: number
  startS: number
  endS: number
  durationS: number
  cutOff: boolean
  /** As measured, and at body temperature and pressure, saturated. */
  volumeMl: number | null
  volumeBtpsMl: number | null
  endTidalCo2Percent: number
  /** 5th percentile of the whole trace. */
  inspiredCo2Percent: number
  /** Over the run of outward flow. */
  meanFlowMlS: number | null
  phaseThreeS: number
  window: PlateauWindow | null
  readings: Reading[]
  flags: Flag[]
  /** No flag rejects the exhalation itself; each reading has its own verdict. */
  accepted: boolean
}

/** Standard uncertainties of a session's value and the expanded one, GUM; all in ppb. */
export type Uncertainty = {
  repeatabilityPpb: number
  calibrationPpb: number
  resolutionPpb: number
  driftPpb: number
  roomAirPpb: number
  co2Ppb: number
  combinedPpb: number
  /** Welch–Satterthwaite, from the repeatability; null where the exhalations do not differ. */
  degreesOfFreedom: number | null
  coverage: number
  expandedPpb: number
}

export type AnalyteSession = {
  analyte: string
  rule: 'median' | 'pair'
  /** By the protocol's rule from accepted readings; null where they do not suffice. */
  valuePpb: number | null
  nAccepted: number
  /** Numbers of the exhalations that the value stands on. */
  usedExhalations: number[]
  /** The first pair of accepted readings that agree. */
  firstPair: [number, number] | null
  /** Of the accepted readings, n − 1. */
  sdPpb: number | null
  cvPercent: number | null
  /** The value lies below the limit of detection. */
  censored: boolean
  /** What was taken to be true of the instrument. */
  instrument: Partial<InstrumentData>
  roomAirPpb: number | null
  gradientPpb: number | null
  co2Normalised: Adjusted
  dilutionCorrected: Adjusted
  /** Null where the calibration's uncertainty is not known. */
  uncertainty: Uncertainty | null
  gradientUncertainty: Uncertainty | null
}

export type TraceResult = {
  /** Raised when a trace may get another answer than before. */
  algorithmVersion: number
  recording: Recording
  samples: number
  intervalS: number
  exhalations: Exhalation[]
  analytes: AnalyteSession[]
}
