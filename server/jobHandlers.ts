import { analysisRun } from './features/analyses/analyses.jobs.ts'
import { enterImportJob, previewImportJob } from './features/imports/imports.jobs.ts'
import { reportWriting } from './features/reports/reports.jobs.ts'
import type { JobHandlers } from './jobs/runner.ts'

/** Which feature does which job. */
export const JOB_HANDLERS: JobHandlers = {
  'analysis.run': analysisRun,
  'import.enter': enterImportJob,
  'import.preview': previewImportJob,
  'report.write': reportWriting,
}
