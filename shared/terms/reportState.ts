export const REPORT_STATES = ['preparing', 'issued', 'failed'] as const
export type ReportState = (typeof REPORT_STATES)[number]
export const REPORT_STATE_LABELS: Record<ReportState, string> = {
  preparing: 'Being written',
  issued: 'Issued',
  failed: 'Could not be written',
}

/** The open part carries no accuracy; the closed part is for the monitor. */
export const REPORT_PARTS = ['open', 'closed'] as const
export type ReportPart = (typeof REPORT_PARTS)[number]
export const REPORT_PART_LABELS: Record<ReportPart, string> = {
  open: 'Open part',
  closed: 'Closed part',
}
