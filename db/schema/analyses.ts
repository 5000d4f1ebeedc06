import {
  customType,
  index,
  int,
  json,
  mysqlEnum,
  mysqlTable,
  uniqueIndex,
  varchar,
} from 'drizzle-orm/mysql-core'
import type { AnalysisParameters } from '#shared/schemas/analysis.ts'
import { ANALYSIS_BADGES, ANALYSIS_KINDS } from '#shared/terms/analysis.ts'
import { instant, recordColumns, sha256, uuid } from './columns.ts'

const mediumtext = customType<{ data: string }>({ dataType: () => 'mediumtext' })

/** A computation on a dataset with all that it takes to repeat it. Class: linked. */
export const analyses = mysqlTable(
  'analyses',
  {
    ...recordColumns,
    datasetId: uuid('dataset_id').notNull(),
    number: int('number').notNull(),
    kind: mysqlEnum('kind', ANALYSIS_KINDS).notNull(),
    badge: mysqlEnum('badge', ANALYSIS_BADGES).notNull(),
    title: varchar('title', { length: 200 }).notNull(),
    parameters: json('parameters').$type<AnalysisParameters>().notNull(),
    protocolVersion: int('protocol_version').notNull(),
    statisticsVersion: varchar('statistics_version', { length: 20 }).notNull(),
    seed: int('seed').notNull(),
    /** Result in canonical JSON: the same build repeats it to the last byte. */
    result: mediumtext('result').notNull(),
    resultHash: sha256('result_hash').notNull(),
    runBy: uuid('run_by').notNull(),
    runAt: instant('run_at').notNull(),
  },
  (t) => [
    uniqueIndex('analyses_number').on(t.studyId, t.number),
    index('analyses_dataset').on(t.datasetId),
  ],
)
