export const ANALYSIS_KINDS = [
  'accuracy',
  'agreement',
  'comparison',
  'panel',
  'precision',
  'correlation',
] as const
export type AnalysisKind = (typeof ANALYSIS_KINDS)[number]
export const ANALYSIS_KIND_LABELS: Record<AnalysisKind, string> = {
  accuracy: 'Accuracy',
  agreement: 'Agreement',
  comparison: 'Comparison',
  panel: 'Panel of gases',
  precision: 'Precision',
  correlation: 'Rank correlation',
}

export const ANALYSIS_BADGES = ['planned', 'plannedAmended', 'exploratory'] as const
export type AnalysisBadge = (typeof ANALYSIS_BADGES)[number]
export const ANALYSIS_BADGE_LABELS: Record<AnalysisBadge, string> = {
  planned: 'Planned',
  plannedAmended: 'Planned, amended after interim',
  exploratory: 'Exploratory',
}

/** Why an analysis of earlier data can be nothing but exploratory. */
export const EARLIER_DATA_BADGE_REASON =
  'Exploratory: the data of this study had been seen before any plan for their analysis was signed.'

/** Several sessions of a subject: all of them with the subject as one cluster, or one value by a rule. */
export const SESSION_RULES = ['every', 'first', 'mean', 'median'] as const
export type SessionRule = (typeof SESSION_RULES)[number]
export const SESSION_RULE_LABELS: Record<SessionRule, string> = {
  every: 'Every session, subjects as clusters',
  first: 'First session of each subject',
  mean: 'Mean of each subject’s sessions',
  median: 'Median of each subject’s sessions',
}

/** Why a subject of the dataset is not counted in an analysis; the first that applies. */
export const LEFT_OUT_REASONS = [
  'noOutcome',
  'notDone',
  'indeterminate',
  'noValuePresent',
  'noValueAbsent',
  'incompletePresent',
  'incompleteAbsent',
  'inNeitherGroup',
  'neitherValue',
  'noSensorValue',
  'noReferenceValue',
  'notInOneSession',
] as const
export type LeftOutReason = (typeof LEFT_OUT_REASONS)[number]
export const LEFT_OUT_LABELS: Record<LeftOutReason, string> = {
  noOutcome: 'No reference outcome recorded',
  notDone: 'Reference not done',
  indeterminate: 'Reference outcome indeterminate',
  noValuePresent: 'Condition present, no valid sensor value',
  noValueAbsent: 'Condition absent, no valid sensor value',
  incompletePresent: 'Condition present, not a valid value of every analyte',
  incompleteAbsent: 'Condition absent, not a valid value of every analyte',
  inNeitherGroup: 'In neither of the groups compared, or group not recorded',
  neitherValue: 'Neither a sensor nor a reference value',
  noSensorValue: 'No sensor value',
  noReferenceValue: 'No reference analyser value',
  notInOneSession: 'Sensor and reference value never in one session',
}

/** Ways to choose a cut-off from the data themselves; what they find is exploratory. */
export const CUT_OFF_RULES = [
  'youden',
  'closestToCorner',
  'sensitivityAtLeast',
  'specificityAtLeast',
] as const
export type CutOffRule = (typeof CUT_OFF_RULES)[number]
export const CUT_OFF_RULE_LABELS: Record<CutOffRule, string> = {
  youden: 'Youden',
  closestToCorner: 'closest to corner',
  sensitivityAtLeast: 'sensitivity ≥ 0.90',
  specificityAtLeast: 'specificity ≥ 0.90',
}
/** How the interval of an area is made. */
export const AREA_INTERVALS = ['delong', 'logit', 'bootstrap'] as const
export type AreaIntervalChoice = (typeof AREA_INTERVALS)[number]
export const AREA_INTERVAL_LABELS: Record<AreaIntervalChoice, string> = {
  delong: 'DeLong',
  logit: 'DeLong, logit scale',
  bootstrap: 'Bootstrap',
}

/** What subjects can be divided by to look at parts of them. */
export const SUBGROUPINGS = ['site', 'sex', 'ageBand'] as const
export type Subgrouping = (typeof SUBGROUPINGS)[number]
export const SUBGROUPING_LABELS: Record<Subgrouping, string> = {
  site: 'Site',
  sex: 'Sex',
  ageBand: 'Age band',
}

/** What is made of results in doubt. */
export const SCENARIO_LABELS = {
  leftOut: 'Left out',
  countedPositive: 'Counted as positive',
  countedNegative: 'Counted as negative',
  best: 'All agree with the sensor',
  worst: 'All disagree with the sensor',
} as const

/** How the flattery of fitting a panel to the same data is taken off. */
export const PANEL_VALIDATIONS = ['bootstrap', 'crossValidation'] as const
export type PanelValidation = (typeof PANEL_VALIDATIONS)[number]
export const PANEL_VALIDATION_LABELS: Record<PanelValidation, string> = {
  bootstrap: 'Bootstrap',
  crossValidation: 'Cross-validation, 10 folds',
}

/** What stands beside a cut-off that a rule chose, where nothing was drawn to correct it. */
export const NOT_CORRECTED =
  'Sensitivity and specificity of a cut-off chosen from these data flatter it on the same data; they were not corrected in this analysis.'

export const CHOSEN_FROM_DATA = 'Chosen from these data, so exploratory'

/** What a two-by-two table tells, in the order in which it is shown. */
export const MEASURES = [
  'sensitivity',
  'specificity',
  'likelihoodRatioPositive',
  'likelihoodRatioNegative',
  'diagnosticOddsRatio',
  'positivePredictiveValueObserved',
  'negativePredictiveValueObserved',
  'positivePredictiveValueAtPrevalence',
  'negativePredictiveValueAtPrevalence',
] as const
export type Measure = (typeof MEASURES)[number]

/** Label of a measure; the stated prevalence stands in the label of the values that hang on it. */
export function measureLabel(measure: Measure, prevalence: number | null): string {
  const stated = prevalenceText(prevalence ?? 0)
  return {
    sensitivity: 'Sensitivity',
    specificity: 'Specificity',
    likelihoodRatioPositive: 'Likelihood ratio +',
    likelihoodRatioNegative: 'Likelihood ratio −',
    diagnosticOddsRatio: 'Diagnostic odds ratio',
    positivePredictiveValueObserved: 'PPV as observed',
    negativePredictiveValueObserved: 'NPV as observed',
    positivePredictiveValueAtPrevalence: `PPV at prevalence ${stated}`,
    negativePredictiveValueAtPrevalence: `NPV at prevalence ${stated}`,
  }[measure]
}

/** 0.2 as 0.20, and 0.005 as it is. */
function prevalenceText(prevalence: number): string {
  const plain = String(prevalence)
  return plain.length < 4 ? prevalence.toFixed(2) : plain
}

/** How limits of agreement stand to the limits that were agreed to be acceptable. */
export const ACCEPTANCE_VERDICTS = ['within', 'notShown', 'beyond'] as const
export type AcceptanceVerdict = (typeof ACCEPTANCE_VERDICTS)[number]
export const ACCEPTANCE_VERDICT_WORDS: Record<AcceptanceVerdict, string> = {
  within:
    'Both limits of agreement and their intervals lie within the acceptance limits: the sensor agrees closely enough.',
  notShown:
    'Both limits of agreement lie within the acceptance limits, but an interval reaches beyond them or cannot be given: with this number of pairs it is not shown that the sensor agrees closely enough.',
  beyond:
    'A limit of agreement lies beyond the acceptance limits: the sensor does not agree closely enough.',
}
