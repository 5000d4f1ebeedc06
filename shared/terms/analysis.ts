export const ANALYSIS_KINDS = ['accuracy', 'agreement'] as const
export type AnalysisKind = (typeof ANALYSIS_KINDS)[number]
export const ANALYSIS_KIND_LABELS: Record<AnalysisKind, string> = {
  accuracy: 'Accuracy',
  agreement: 'Agreement',
}

export const ANALYSIS_BADGES = ['planned', 'plannedAmended', 'exploratory'] as const
export type AnalysisBadge = (typeof ANALYSIS_BADGES)[number]
export const ANALYSIS_BADGE_LABELS: Record<AnalysisBadge, string> = {
  planned: 'Planned',
  plannedAmended: 'Planned, amended after interim',
  exploratory: 'Exploratory',
}
