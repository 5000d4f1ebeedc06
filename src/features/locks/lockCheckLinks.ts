import type { LockCheckKey } from '#shared/terms/lockState.ts'

type CheckLink = { to: string; label: string }

/** Where each check of the list can be looked into and mended, from the study's address on. */
const LINKS: Record<LockCheckKey, CheckLink> = {
  subjects: { to: 'imports', label: 'Bring in a file' },
  imports: { to: 'imports', label: 'Open the imports' },
  sensorValues: { to: 'sessions', label: 'Open Sessions' },
  outcomes: { to: 'reference', label: 'Open Reference' },
  indeterminateOutcomes: { to: 'reference?outcome=indeterminate', label: 'Open them' },
  referenceValues: { to: 'reference', label: 'Open Reference' },
  analytes: { to: 'protocol', label: 'Open the protocol' },
  refusedRows: { to: 'imports', label: 'Open the imports' },
}

export function lockCheckLink(studyId: string, key: LockCheckKey): CheckLink {
  const { to, label } = LINKS[key]
  return { to: `/studies/${studyId}/${to}`, label }
}
