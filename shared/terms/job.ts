export const JOB_KINDS = ['import.preview', 'import.enter', 'report.write', 'analysis.run'] as const
export type JobKind = (typeof JOB_KINDS)[number]

export const JOB_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const
