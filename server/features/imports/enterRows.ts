import { eq } from 'drizzle-orm'
import { importChunks } from '#db/schema/importChunks.ts'
import { importRows } from '#db/schema/importRows.ts'
import { imports } from '#db/schema/imports.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'
import { change } from '#server/changes/change.ts'
import { randomSubjectCode, takenCodes } from '#server/features/subjects/subjectCodes.reads.ts'
import type { JobContext } from '#server/jobs/runner.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { ImportEntry, ImportMapping } from '#shared/schemas/import.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { compareStored } from './compareStored.ts'
import { composeRecords, type EnteringRow } from './composeRecords.ts'
import { headings } from './headings.ts'
import { allRows, studyTerms } from './imports.reads.ts'
import { storedSubjects } from './storedSubjects.ts'
import { subjectDigester } from './subjectDigest.ts'

type StoredRow = Awaited<ReturnType<typeof allRows>>[number]

/**
 * Job: enters the new rows but those left out, in one transaction with one reason and one audit
 * event a row. Afterwards the file and what was read of it are gone; line and subject code stay.
 */
export async function enterRows({ job, actor, progress }: JobContext): Promise<void> {
  const importId = job.recordId
  const { leaveOutLines, reason } = job.payload as { leaveOutLines: number[]; reason: string }
  await change({ actor, action: 'import.store', of: { importId }, reason }, async (tx) => {
    const { studyId } = tx.allowed
    // All imports of the study wait here for each other, so that no two enter the same subject.
    const all = await tx.read
      .select()
      .from(imports)
      .where(eq(imports.studyId, studyId))
      .for('update')
    const found = all.find((each) => each.id === importId)
    if (found?.state === 'entered' && found.jobId === job.id) return
    if (found?.state !== 'previewed' || found.jobId !== job.id || !found.mapping || !found.counts)
      throw new AppError('changed-meanwhile')

    await progress(0, found.counts.new, 'Reading what was checked')
    const rows = await allRows(tx.read, importId)
    const entering = await enteringRows(tx, rows, found.mapping, new Set(leaveOutLines))
    const { records, codes, subjects } = composeRecords(entering, {
      studyId,
      importId,
      importNumber: found.number,
      at: tx.at,
      analyteIds: new Map((await studyTerms(tx.read, studyId)).analytes.map((a) => [a.key, a.id])),
      digestOf: subjectDigester(studyId),
      newCode: await codeGiver(tx),
    })
    await tx.insertCompound(records, (done) => progress(done, records.length, 'Entering the rows'))
    await blankRows(tx, importId, rows, codes)
    await tx.update(imports, importId, {
      state: 'entered',
      enteredAt: tx.at,
      counts: { ...found.counts, entered: { rows: records.length, subjects } },
    })
    await progress(records.length, records.length, 'Writing the audit trail')
  })
}

/**
 * The rows to enter, held against what is stored at this very moment.
 * @throws AppError changed-meanwhile when another import came in between
 */
async function enteringRows(
  tx: ChangeTx,
  rows: readonly StoredRow[],
  mapping: ImportMapping,
  leftOut: ReadonlySet<number>,
): Promise<EnteringRow[]> {
  const { studyId } = tx.allowed
  const stored = await storedSubjects(tx.read, studyId)
  const digestOf = subjectDigester(studyId)
  const heading = headings(mapping)
  return rows
    .filter((row) => row.fate === 'new' && !leftOut.has(row.line))
    .map(({ line, entry }) => {
      const read = entry as ImportEntry
      const subject = stored.size > 0 ? stored.get(digestOf(read.subjectWord)) : undefined
      if (!subject) return { line, entry: read, stored: null }
      const { contradictions, adds } = compareStored(read, subject, heading)
      if (contradictions.length > 0 || !adds)
        throw new AppError('changed-meanwhile', {
          message: `Since the check, data of these subjects came in another way (line ${formatCount(line)}). Nothing was entered. Check the rows again.`,
        })
      return { line, entry: read, stored: { subject, adds } }
    })
}

/** Gives codes that no subject of the site has. */
async function codeGiver(tx: ChangeTx): Promise<(siteId: string) => string> {
  const { studyId } = tx.allowed
  const { sites } = await studyTerms(tx.read, studyId)
  const taken = new Map<string, { prefix: string; codes: Set<string> }>()
  for (const { id, prefix } of sites)
    taken.set(id, { prefix, codes: await takenCodes(tx.read, studyId, id) })
  return (siteId) => {
    const site = taken.get(siteId)
    if (!site) throw new AppError('changed-meanwhile')
    const code = randomSubjectCode(site.prefix, site.codes)
    site.codes.add(code)
    return code
  }
}

/** Takes away the file and what was read of each row; the line and the code that it got stay. */
async function blankRows(
  tx: ChangeTx,
  importId: string,
  rows: readonly StoredRow[],
  codes: ReadonlyMap<number, string>,
): Promise<void> {
  await tx.passing().delete(importChunks).where(eq(importChunks.importId, importId))
  await tx.passing().delete(importRows).where(eq(importRows.importId, importId))
  await tx.put(
    importRows,
    rows.map((row) => ({
      ...row,
      entry: null,
      found: null,
      subjectCode: codes.get(row.line) ?? null,
    })),
  )
}
