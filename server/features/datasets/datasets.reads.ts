import { and, asc, desc, eq, gt } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { datasetRows } from '#db/schema/datasetRows.ts'
import { datasets } from '#db/schema/datasets.ts'
import { locks } from '#db/schema/locks.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { AppError, refuseField } from '#shared/errors/AppError.ts'
import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'

/** Rows are fetched in pieces, so that parsing them never holds other requests up for long. */
const ROWS_AT_A_TIME = 2_000

const columns = {
  id: datasets.id,
  studyId: datasets.studyId,
  lockKind: locks.kind,
  lockNumber: locks.number,
  frozenAt: datasets.frozenAt,
  hash: datasets.hash,
  subjectCount: datasets.subjectCount,
  rowCount: datasets.rowCount,
  manifest: datasets.manifest,
  protocol: protocolVersions.document,
}
export type DatasetRecord = Awaited<ReturnType<typeof getDataset>>

/** A dataset with the protocol that stood when it was frozen. @throws AppError not-found */
export async function getDataset(read: Reader, datasetId: string) {
  const [row] = await read
    .select(columns)
    .from(datasets)
    .innerJoin(locks, eq(locks.id, datasets.lockId))
    .innerJoin(protocolVersions, eq(protocolVersions.id, datasets.protocolVersionId))
    .where(eq(datasets.id, datasetId))
  if (!row) throw new AppError('not-found')
  return row
}

/** The datasets of a study, the newest first. */
export function listDatasets(read: Reader, studyId: string) {
  const { manifest: _manifest, protocol: _protocol, ...short } = columns
  return read
    .select(short)
    .from(datasets)
    .innerJoin(locks, eq(locks.id, datasets.lockId))
    .where(eq(datasets.studyId, studyId))
    .orderBy(desc(datasets.frozenAt))
}

/** All rows of a dataset in their frozen order. Class: linked. */
export async function readDatasetRows(read: Reader, datasetId: string): Promise<DatasetRow[]> {
  const rows: DatasetRow[] = []
  let last = 0
  for (;;) {
    const piece = await read
      .select({ position: datasetRows.position, row: datasetRows.row })
      .from(datasetRows)
      .where(and(eq(datasetRows.datasetId, datasetId), gt(datasetRows.position, last)))
      .orderBy(asc(datasetRows.position))
      .limit(ROWS_AT_A_TIME)
    for (const each of piece) rows.push(each.row)
    if (piece.length < ROWS_AT_A_TIME) return rows
    last = piece.at(-1)!.position
  }
}

/** An analyte as the dataset was frozen with it. @throws AppError invalid, at `field` */
export function frozenAnalyte(
  manifest: DatasetManifest,
  key: string,
  field: string,
): DatasetManifest['analytes'][number] {
  const found = manifest.analytes.find((analyte) => analyte.key === key)
  return found ?? refuseField(field, 'This dataset has no such analyte.')
}
