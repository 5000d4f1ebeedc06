/** On what scale sensor and reference are set against each other. */
export const AGREEMENT_SCALES = [
  'difference',
  'ratio',
  'percent',
  'regression',
  'nonparametric',
] as const
export type AgreementScale = (typeof AGREEMENT_SCALES)[number]
export const AGREEMENT_SCALE_LABELS: Record<AgreementScale, string> = {
  difference: 'Differences',
  ratio: 'Ratios, by logarithms',
  percent: 'Differences in percent of the mean',
  regression: 'Differences that change with size',
  nonparametric: 'Differences, by percentiles',
}

/** What the middle line is on each scale. */
export const MIDDLE_LINE_LABELS: Record<AgreementScale, string> = {
  difference: 'Bias',
  ratio: 'Mean ratio',
  percent: 'Bias',
  regression: 'Bias at the middle',
  nonparametric: 'Median difference',
}

/** How the lines of a scale are read off the pairs. */
export const DIFFERENCE_LABELS: Record<AgreementScale, string> = {
  difference: 'Sensor − reference',
  ratio: 'Sensor ÷ reference',
  percent: '(Sensor − reference) ÷ mean',
  regression: 'Sensor − reference',
  nonparametric: 'Sensor − reference',
}

/** The unit of the lines in codes of UCUM; null is the analyte's own. */
export const SCALE_UNITS: Record<AgreementScale, string | null> = {
  difference: null,
  ratio: '1',
  percent: '%',
  regression: null,
  nonparametric: null,
}

/** With several sessions of a subject: what the true value does from one to the next. */
export const TRUE_VALUES = ['varying', 'constant'] as const
export type TrueValue = (typeof TRUE_VALUES)[number]
export const TRUE_VALUE_LABELS: Record<TrueValue, string> = {
  varying: 'Changes from session to session',
  constant: 'Stays the same',
}

/** Whether limits by regression widen with size. */
export const SPREADS = ['changing', 'constant'] as const
export type Spread = (typeof SPREADS)[number]
export const SPREAD_LABELS: Record<Spread, string> = {
  changing: 'Changes with size too',
  constant: 'Is the same at all sizes',
}

/** Lines of the sensor on the reference. */
export const FITTED_LINES = ['ordinary', 'deming', 'passingBablok'] as const
export type FittedLine = (typeof FITTED_LINES)[number]
export const FITTED_LINE_LABELS: Record<FittedLine, string> = {
  ordinary: 'Ordinary',
  deming: 'Deming',
  passingBablok: 'Passing–Bablok',
}
