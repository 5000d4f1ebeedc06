/** What happened, in the past tense and in plain words, for every event that a trail can hold. */
export const AUDIT_EVENT_LABELS: Readonly<Record<string, string>> = {
  'attempt.refused': 'Attempt refused',
  'login.started': 'Signed in',
  'login.reauthenticated': 'Signed in again to sign',
  'login.ended': 'Signed out',
  'login.refused': 'Sign-in refused',

  'study.created': 'Study set up',
  'protocol.amended': 'Protocol amended',
  'site.added': 'Site added',
  'site.corrected': 'Site corrected',
  'member.added': 'Team member added',
  'member.ended': 'Team membership ended',
  'analyte.added': 'Analyte added',

  'subject.enrolled': 'Subject enrolled',
  'subject.corrected': 'Subject corrected',

  'import.uploaded': 'File uploaded',
  'import.columnsNamed': 'Columns of a file named',
  'import.previewed': 'File checked',
  'import.entryRequested': 'Entering of a file asked for',
  'import.entered': 'Row of a file entered',
  'import.codesDownloaded': 'Codes of an import downloaded',
  'import.discarded': 'File discarded',

  'lock.requested': 'Lock asked for',
  'lock.withdrawn': 'Request for the lock withdrawn',
  'lock.returned': 'Request for the lock sent back',
  'lock.approved': 'Lock approved',

  'analysis.run': 'Analysis run',
  'analysis.requested': 'Analysis asked for',
  'analysis.repeated': 'Analysis run again',
  'report.requested': 'Report asked for',
  'report.issued': 'Report issued',
  'report.failed': 'Report could not be written',
  'report.openPartOpened': 'Open part of a report opened',
  'report.closedPartOpened': 'Closed part of a report opened',
  'job.cancelled': 'Work stopped on request',
}

/** An event that has no words yet is shown under its own name rather than not at all. */
export const auditEventLabel = (event: string): string => AUDIT_EVENT_LABELS[event] ?? event

const RECORD_LABELS: Readonly<Record<string, string>> = {
  action: 'Action',
  member: 'Team line',
  session: 'Breath session',
  sessionValue: 'Sensor value',
  referenceMeasurement: 'Reference measurement',
  referenceOutcome: 'Reference outcome',
  import: 'File',
  reportFile: 'Report file',
}

/** The noun of a record as a person reads it: "Sensor value", "Subject". */
export const auditRecordLabel = (recordType: string): string =>
  RECORD_LABELS[recordType] ?? capitalised(inWords(recordType))

/**
 * A field as a person reads it. A row of a file is several records in one event, so its fields carry
 * the record and its place in the row: "sessionValue 2.value" becomes "Sensor value 2: value".
 */
export function auditFieldLabel(field: string): string {
  const [record, name] = field.split('.')
  if (name === undefined) return capitalised(inWords(field))
  const [noun = '', place] = record!.split(' ')
  return `${auditRecordLabel(noun)}${place ? ` ${place}` : ''}: ${inWords(name)}`
}

/** "ageBand" becomes "age band". */
function inWords(name: string): string {
  return name.replace(
    /([a-z\d])([A-Z])/g,
    (_, before: string, after: string) => `${before} ${after.toLowerCase()}`,
  )
}

const capitalised = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
