import { setImmediate as letOthersRun } from 'node:timers/promises'
import { newId } from '#db/id.ts'
import { datasets } from '#db/schema/datasets.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'
import { canonicalJson, sha256Hex } from '#server/changes/hash.ts'
import { currentProtocol } from '#server/features/protocol/protocol.reads.ts'
import { getStudy } from '#server/features/studies/studies.reads.ts'
import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import type { LockKind } from '#shared/terms/lockState.ts'
import { datasetRowsOf } from './datasetRowsOf.ts'
import { studyStanding } from './locks.reads.ts'
import { AT_A_STRETCH, hashLines, hashStudyTables, readStudyTables } from './studyTables.ts'

/**
 * Freezes a copy of a study's data: rows first, each with the hash of its canonical form, then the
 * dataset with the manifest that stands for them. A trigger lets no row join it afterwards. The
 * change must hold the study's guard alone, so that nothing is written meanwhile.
 */
export async function freezeDataset(
  tx: ChangeTx,
  of: { lockId: string; lockKind: LockKind },
): Promise<{ datasetId: string; hash: string; auditHeadHash: string }> {
  const { studyId } = tx.allowed
  const tables = await readStudyTables(tx.read, studyId)
  const protocol = await currentProtocol(tx.read, studyId)
  const { auditCount, auditHeadHash } = await studyStanding(tx.read, studyId)
  const datasetId = newId()
  const rows = datasetRowsOf(tables)
  const hashes = await writeRows(tx, datasetId, rows)
  const manifest: DatasetManifest = {
    study: (await getStudy(tx.read, studyId)).code,
    lockKind: of.lockKind,
    frozenAt: tx.at.toISOString(),
    protocolVersion: protocol.number,
    protocolHash: protocol.documentHash,
    analytes: tables.analytes
      .map(({ key, name, unit }) => ({ key, name, unit }))
      .sort((a, b) => (a.key < b.key ? -1 : 1)),
    subjectCount: tables.subjects.length,
    rowCount: rows.length,
    rowsHash: await hashLines(hashes.map((hash) => () => hash)),
    tables: await hashStudyTables(tables),
    auditCount,
    auditHeadHash,
  }
  const hash = sha256Hex(canonicalJson(manifest))
  await tx.insert(datasets, {
    id: datasetId,
    studyId,
    createdAt: tx.at,
    lockId: of.lockId,
    frozenAt: tx.at,
    protocolVersionId: protocol.id,
    subjectCount: manifest.subjectCount,
    rowCount: manifest.rowCount,
    hash,
    manifest,
    auditCount,
    auditHeadHash,
  })
  return { datasetId, hash, auditHeadHash }
}

async function writeRows(
  tx: ChangeTx,
  datasetId: string,
  rows: readonly DatasetRow[],
): Promise<string[]> {
  const hashes: string[] = []
  for (let from = 0; from < rows.length; from += AT_A_STRETCH) {
    const frozen = rows.slice(from, from + AT_A_STRETCH).map((row, at) => ({
      datasetId,
      position: from + at + 1,
      row,
      hash: sha256Hex(canonicalJson(row)),
    }))
    hashes.push(...frozen.map((each) => each.hash))
    await tx.freeze(frozen)
    await letOthersRun()
  }
  return hashes
}
