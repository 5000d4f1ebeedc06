import type { JobHandler } from '#server/jobs/runner.ts'
import { enterRows } from './enterRows.ts'
import { previewRows } from './previewRows.ts'

/**
 * Neither leaves anything to put right: what an import is follows from its row and its job, and a
 * transaction that did not end has written nothing.
 */
const nothingToMend = async () => undefined

export const previewImportJob: JobHandler = { run: previewRows, ended: nothingToMend }
export const enterImportJob: JobHandler = { run: enterRows, ended: nothingToMend }
