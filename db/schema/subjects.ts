import { index, json, mysqlEnum, mysqlTable, uniqueIndex, varchar } from 'drizzle-orm/mysql-core'
import { AGE_BANDS, SEXES } from '#shared/terms/subject.ts'
import { instant, recordColumns, sha256, uuid } from './columns.ts'

export const subjects = mysqlTable(
  'subjects',
  {
    ...recordColumns,
    siteId: uuid('site_id').notNull(),
    /** Site prefix, random number, check character: N04-7316-W. Never made from an identity. */
    code: varchar('code', { length: 16 }).notNull(),
    sex: mysqlEnum('sex', SEXES),
    ageBand: mysqlEnum('age_band', AGE_BANDS),
    enrolledAt: instant('enrolled_at').notNull(),
    /** Coded covariates by key, as the protocol or the import names them. */
    covariates: json('covariates').$type<Record<string, string | number>>().notNull(),
    importId: uuid('import_id'),
    /** Keyed digest of the subject's word in the imported file: finds the same row again, tells nothing. */
    sourceDigest: sha256('source_digest'),
  },
  (t) => [
    uniqueIndex('subjects_code').on(t.studyId, t.code),
    index('subjects_site').on(t.studyId, t.siteId, t.code),
    index('subjects_import').on(t.importId),
    index('subjects_source').on(t.studyId, t.sourceDigest),
  ],
)
