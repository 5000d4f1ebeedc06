export const DIRECTIONS = ['higher', 'lower'] as const
export type Direction = (typeof DIRECTIONS)[number]
export const DIRECTION_LABELS: Record<Direction, string> = {
  higher: 'Higher values point to the condition',
  lower: 'Lower values point to the condition',
}
export const POSITIVE_RULES: Record<Direction, string> = {
  higher: 'Positive at or above',
  lower: 'Positive at or below',
}

/** How subjects came in; where they were chosen by outcome, observed predictive values mean nothing. */
export const SAMPLINGS = ['cohort', 'byOutcome'] as const
export type Sampling = (typeof SAMPLINGS)[number]
export const SAMPLING_LABELS: Record<Sampling, string> = {
  cohort: 'As they came (cohort)',
  byOutcome: 'By outcome (cases and controls)',
}
