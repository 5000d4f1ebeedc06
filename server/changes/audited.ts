import { getTableName } from 'drizzle-orm'
import type { MySqlTable } from 'drizzle-orm/mysql-core'
import { analyses } from '#db/schema/analyses.ts'
import { analytes } from '#db/schema/analytes.ts'
import { datasets } from '#db/schema/datasets.ts'
import { imports } from '#db/schema/imports.ts'
import { locks } from '#db/schema/locks.ts'
import { members } from '#db/schema/members.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { referenceMeasurements } from '#db/schema/referenceMeasurements.ts'
import { referenceOutcomes } from '#db/schema/referenceOutcomes.ts'
import { reportFiles } from '#db/schema/reportFiles.ts'
import { reports } from '#db/schema/reports.ts'
import { sessions } from '#db/schema/sessions.ts'
import { sessionValues } from '#db/schema/sessionValues.ts'
import { signatures } from '#db/schema/signatures.ts'
import { sites } from '#db/schema/sites.ts'
import { studies } from '#db/schema/studies.ts'
import { subjects } from '#db/schema/subjects.ts'
import type { InformationClass } from '#shared/policy/informationClasses.ts'

type Row = Record<string, unknown>

export type Audited = {
  /** The noun in the trail. */
  record: string
  informationClass: InformationClass
  /** Fields of another class than the record's. */
  classes?: Record<string, InformationClass>
  /** The key of the record, where it is not the row's own. */
  key?: (row: Row) => string
  /** What a reader calls the record; never a value that tells anything. */
  label?: (row: Row) => string
  /** Fields that add nothing to the trail: keys, bytes, and what a hash beside them stands for. */
  omit?: readonly string[]
}

const byCode = (row: Row) => String(row.code)
const byName = (row: Row) => String(row.name)
const byNumber = (row: Row) => `no. ${row.number}`

const AUDITED = new Map<MySqlTable, Audited>([
  [studies, { record: 'study', informationClass: 'none', label: byCode, omit: ['createdBy'] }],
  [
    protocolVersions,
    {
      record: 'protocol',
      informationClass: 'none',
      label: (row) => `version ${row.number}`,
      omit: ['createdBy'],
    },
  ],
  [sites, { record: 'site', informationClass: 'none', label: byName }],
  [members, { record: 'member', informationClass: 'none' }],
  [analytes, { record: 'analyte', informationClass: 'none', label: byName }],
  [
    subjects,
    {
      record: 'subject',
      informationClass: 'none',
      label: byCode,
      omit: ['siteId', 'importId', 'sourceDigest'],
      classes: { covariates: 'linked' },
    },
  ],
  [
    sessions,
    { record: 'session', informationClass: 'none', label: byNumber, omit: ['siteId', 'subjectId'] },
  ],
  [
    sessionValues,
    {
      record: 'sessionValue',
      informationClass: 'index',
      omit: ['siteId', 'sessionId', 'analyteId'],
    },
  ],
  [
    referenceMeasurements,
    {
      record: 'referenceMeasurement',
      informationClass: 'reference',
      omit: ['siteId', 'sessionId', 'analyteId'],
    },
  ],
  [
    referenceOutcomes,
    { record: 'referenceOutcome', informationClass: 'reference', omit: ['siteId', 'subjectId'] },
  ],
  [
    imports,
    {
      record: 'import',
      informationClass: 'none',
      label: byNumber,
      classes: { columns: 'linked', mapping: 'linked', counts: 'linked' },
      omit: ['jobId', 'uploadedBy'],
    },
  ],
  [locks, { record: 'lock', informationClass: 'none', label: byNumber }],
  [datasets, { record: 'dataset', informationClass: 'none', omit: ['manifest'] }],
  [
    signatures,
    { record: 'signature', informationClass: 'none', label: (row) => String(row.meaning) },
  ],
  [
    analyses,
    { record: 'analysis', informationClass: 'linked', label: byNumber, omit: ['result', 'runBy'] },
  ],
  [
    reports,
    { record: 'report', informationClass: 'none', label: byNumber, omit: ['jobId', 'issuedBy'] },
  ],
  [
    reportFiles,
    {
      record: 'reportFile',
      informationClass: 'none',
      key: (row) => String(row.reportId),
      label: (row) => `${row.part} part`,
      omit: ['bytes'],
    },
  ],
])

const ALWAYS_OMITTED = ['id', 'studyId', 'version', 'createdAt']

/** How a table appears in the audit trail. @throws when it does not: such tables have their own place. */
export function auditedAs(table: MySqlTable): Audited {
  const audited = AUDITED.get(table)
  if (!audited) throw new Error(`${getTableName(table)} is not an audited table.`)
  return audited
}

/** The fields of a row that the trail keeps. */
export function auditedFields(table: MySqlTable, row: Row): string[] {
  const omitted = auditedAs(table).omit ?? []
  return Object.keys(row).filter(
    (field) => !ALWAYS_OMITTED.includes(field) && !omitted.includes(field),
  )
}
