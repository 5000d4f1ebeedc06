/**
 * `previewing`, `entering` and `failed` are not stored: they follow from the job under way or last
 * ended, so that a job that dies leaves nothing to put right.
 */
export const IMPORT_STATES = [
  'uploaded',
  'previewing',
  'previewed',
  'entering',
  'entered',
  'discarded',
  'failed',
] as const
export type ImportState = (typeof IMPORT_STATES)[number]
export const IMPORT_STATE_LABELS: Record<ImportState, string> = {
  uploaded: 'Columns to be named',
  previewing: 'Being checked',
  previewed: 'Ready to enter',
  entering: 'Being entered',
  entered: 'Entered',
  discarded: 'Discarded',
  failed: 'Could not be read',
}

/** What becomes of a row of the file: entered as new, nothing left to do, or refused. */
export const ROW_FATES = ['new', 'same', 'refused'] as const
export type RowFate = (typeof ROW_FATES)[number]
export const ROW_FATE_LABELS: Record<RowFate, string> = {
  new: 'New',
  same: 'Already here',
  refused: 'Refused',
}
