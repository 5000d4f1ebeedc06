import { eq } from 'drizzle-orm'
import { reader } from '#db/client.ts'
import { importRows } from '#db/schema/importRows.ts'
import { imports } from '#db/schema/imports.ts'
import { change } from '#server/changes/change.ts'
import type { JobContext } from '#server/jobs/runner.ts'
import { AppError } from '#shared/errors/AppError.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { countRows } from './countRows.ts'
import { readCsvRows } from './csvRows.ts'
import { gasKeysOf } from './gasKeys.ts'
import { PIECE_BYTES } from './importLimits.ts'
import { filePiece, getImport, studyTerms } from './imports.reads.ts'
import { type JudgedRow, judgeRows } from './judgeRows.ts'
import { rowReader } from './readRow.ts'
import { storedSubjects } from './storedSubjects.ts'
import { subjectDigester } from './subjectDigest.ts'

const ROWS_A_STATEMENT = 500

/** Job: reads the whole file, judges each row and stores the fates. */
export async function previewRows({ job, actor, progress }: JobContext): Promise<void> {
  const importId = job.recordId
  const { import: found } = await getImport(reader(), importId)
  const { mapping, studyId, fileBytes } = found
  if (!mapping) throw new AppError('not-in-this-state')

  const pieces = Math.ceil(fileBytes / PIECE_BYTES)
  async function* file() {
    for (let position = 0; position < pieces; position++) {
      await progress(position, pieces, 'Reading the file')
      yield await filePiece(reader(), importId, position)
    }
  }
  const rows = await readCsvRows(file(), mapping.format.delimiter)
  await progress(pieces, pieces, `Judging ${formatCount(rows.length)} rows`)
  const { analytes } = await studyTerms(reader(), studyId)
  const readRow = rowReader(mapping, gasKeysOf(analytes))
  const stored = await storedSubjects(reader(), studyId)
  const digestOf = subjectDigester(studyId)
  const judged = judgeRows(rows.map(readRow), mapping, (word) =>
    stored.size > 0 ? stored.get(digestOf(word)) : undefined,
  )

  const reason = 'The rows of the file were checked.'
  await change({ actor, action: 'import.judge', of: { importId }, reason }, async (tx) => {
    const [now] = await tx.read
      .select({ jobId: imports.jobId })
      .from(imports)
      .where(eq(imports.id, importId))
      .for('update')
    // Another preview has begun meanwhile, or the import was discarded: this result is nobody's.
    if (now?.jobId !== job.id) throw new AppError('changed-meanwhile')
    await tx.passing().delete(importRows).where(eq(importRows.importId, importId))
    for (let from = 0; from < judged.length; from += ROWS_A_STATEMENT) {
      const part = judged.slice(from, from + ROWS_A_STATEMENT)
      await tx.put(importRows, part.map(toStored(importId)))
      await progress(from + part.length, judged.length, 'Keeping what was found')
    }
    await tx.update(imports, importId, { state: 'previewed', counts: countRows(judged, mapping) })
  })
}

const toStored =
  (importId: string) =>
  ({ line, fate, entry, problems }: JudgedRow): typeof importRows.$inferInsert => ({
    importId,
    line,
    fate,
    entry,
    problems: problems.map(({ column, reason }) => ({ column, reason })),
    found: problems.length > 0 ? problems.map((problem) => problem.found) : null,
    subjectCode: null,
  })
