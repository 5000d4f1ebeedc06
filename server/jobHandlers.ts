import type { JobHandlers } from './jobs/runner.ts'

/** Which feature does which job. */
export const JOB_HANDLERS = {} as JobHandlers
