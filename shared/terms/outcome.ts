export const OUTCOMES = ['present', 'absent', 'indeterminate', 'notDone'] as const
export type Outcome = (typeof OUTCOMES)[number]
export const OUTCOME_LABELS: Record<Outcome, string> = {
  present: 'Present',
  absent: 'Absent',
  indeterminate: 'Indeterminate',
  notDone: 'Not done',
}
