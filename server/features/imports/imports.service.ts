import { webcrypto } from 'node:crypto'
import { eq, max } from 'drizzle-orm'
import { reader } from '#db/client.ts'
import { newId } from '#db/id.ts'
import { importChunks } from '#db/schema/importChunks.ts'
import { importRows } from '#db/schema/importRows.ts'
import { imports } from '#db/schema/imports.ts'
import { jobs } from '#db/schema/jobs.ts'
import type { Actor } from '#server/changes/actor.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'
import { change } from '#server/changes/change.ts'
import { enqueue } from '#server/jobs/queue.ts'
import { AppError, refuseField } from '#shared/errors/AppError.ts'
import type {
  Delimiter,
  ImportDiscardRequest,
  ImportEnterRequest,
  ImportPreviewRequest,
} from '#shared/schemas/import.ts'
import { IMPORT_STATE_LABELS, type ImportState } from '#shared/terms/importState.ts'
import { checkMapping } from './checkMapping.ts'
import { proposeDelimiter, readCsvHead } from './csvHead.ts'
import { PIECE_BYTES } from './importLimits.ts'
import {
  filePiece,
  linesWithFate,
  studyTerms,
  unfinishedImportOfSameFile,
} from './imports.reads.ts'
import { stateOf } from './imports.view.ts'
import { columnsOf, readColumns } from './readColumns.ts'
import { requireText } from './uploadedFile.ts'

/** Stores a file on its way in. Its own name is not asked for and not kept. */
export async function uploadImport(
  actor: Actor,
  studyId: string,
  uploaded: Buffer | undefined,
): Promise<string> {
  const bytes = requireText(uploaded)
  const head = bytes.subarray(0, PIECE_BYTES)
  const columns = columnsOf(readCsvHead(head, bytes.length <= PIECE_BYTES, proposeDelimiter(head)))
  const fileHash = Buffer.from(await webcrypto.subtle.digest('SHA-256', bytes)).toString('hex')
  const importId = newId()
  await change({ actor, action: 'import.upload', of: { studyId } }, async (tx) => {
    await refuseOpenTwin(tx, studyId, fileHash)
    const [last] = await tx.read
      .select({ number: max(imports.number) })
      .from(imports)
      .where(eq(imports.studyId, studyId))
    // One piece a statement: the database takes packets of a bounded size.
    for (let from = 0, position = 0; from < bytes.length; from += PIECE_BYTES, position++)
      await tx.put(importChunks, [
        { importId, position, bytes: bytes.subarray(from, from + PIECE_BYTES) },
      ])
    await tx.insert(imports, {
      id: importId,
      studyId,
      createdAt: tx.at,
      number: (last?.number ?? 0) + 1,
      state: 'uploaded',
      fileHash,
      fileBytes: bytes.length,
      columns,
      uploadedBy: actor.personId,
    })
  })
  return importId
}

/** A file that is under way already goes on where it is; one that was entered may come again. */
async function refuseOpenTwin(tx: ChangeTx, studyId: string, fileHash: string): Promise<void> {
  const twin = await unfinishedImportOfSameFile(tx.read, { studyId, fileHash })
  if (!twin) return
  const { id, number } = twin
  const message = `This is the file of import ${number}, which is not finished. Go on there, or discard it first.`
  throw new AppError('already-exists', {
    message,
    fields: { file: message },
    more: { importId: id, importNumber: number },
  })
}

/** Headings, samples and suggestions, read from the file's first piece. */
export async function readImportColumns(
  { importId, studyId }: { importId: string; studyId: string },
  asked: Delimiter | undefined,
) {
  const piece = await filePiece(reader(), importId, 0)
  const delimiter = asked ?? proposeDelimiter(piece)
  const head = readCsvHead(piece, piece.length < PIECE_BYTES, delimiter)
  return readColumns(head, delimiter, await studyTerms(reader(), studyId))
}

/** Takes the meaning of the columns and has every row judged; nothing of the study is written. */
export async function previewImport(
  actor: Actor,
  importId: string,
  { mapping, version }: ImportPreviewRequest,
): Promise<void> {
  const reason = 'The meaning of the columns was given.'
  await change({ actor, action: 'import.preview', of: { importId }, reason }, async (tx) => {
    await requireState(tx, importId, ['uploaded', 'previewed', 'failed'])
    const piece = await filePiece(tx.read, importId, 0)
    const head = readCsvHead(piece, piece.length < PIECE_BYTES, mapping.format.delimiter)
    const terms = await studyTerms(tx.read, tx.allowed.studyId)
    const columns = columnsOf(head)
    checkMapping(mapping, {
      columns,
      siteIds: new Set(terms.sites.map((site) => site.id)),
      analyteKeys: new Set(terms.analytes.map((analyte) => analyte.key)),
    })
    const jobId = await enqueue(tx, actor, {
      kind: 'import.preview',
      recordId: importId,
      words: 'Waiting for its turn',
    })
    await tx.passing().delete(importRows).where(eq(importRows.importId, importId))
    const patch = { format: mapping.format, columns, mapping, counts: null, jobId }
    await tx.update(imports, importId, { ...patch, state: 'uploaded' }, version)
  })
}

/** Has all good rows entered, or all but the lines that are named. */
export async function enterImport(
  actor: Actor,
  importId: string,
  { leaveOutLines, reasonForChange: reason, version }: ImportEnterRequest,
): Promise<void> {
  await change({ actor, action: 'import.enter', of: { importId }, reason }, async (tx) => {
    const { counts } = await requireState(tx, importId, ['previewed'])
    const leaveOut = [...new Set(leaveOutLines)]
    const fresh = await linesWithFate(tx.read, importId, 'new', leaveOut)
    const foreign = leaveOut.find((line) => !fresh.has(line))
    if (foreign !== undefined)
      refuseField('leaveOutLines', `Line ${foreign} is not among the rows that would be entered.`)
    if ((counts?.new ?? 0) <= leaveOut.length)
      refuseField('leaveOutLines', 'No row is left that would be entered.')
    const jobId = await enqueue(tx, actor, {
      kind: 'import.enter',
      recordId: importId,
      payload: { leaveOutLines: leaveOut, reason },
      words: 'Waiting for its turn',
    })
    await tx.update(imports, importId, { jobId }, version)
  })
}

/** Removes a file and what was read of it; what it was, and that it was, stays on record. */
export async function discardImport(
  actor: Actor,
  importId: string,
  { reasonForChange: reason, version }: ImportDiscardRequest,
): Promise<void> {
  await change({ actor, action: 'import.discard', of: { importId }, reason }, async (tx) => {
    await requireState(tx, importId, ['uploaded', 'previewed', 'failed'])
    await tx.update(imports, importId, { state: 'discarded' }, version)
    await tx.passing().delete(importChunks).where(eq(importChunks.importId, importId))
    await tx.passing().delete(importRows).where(eq(importRows.importId, importId))
  })
}

/** Holds the import's row until the change is through, and refuses it in any other state. */
async function requireState(tx: ChangeTx, importId: string, states: readonly ImportState[]) {
  const [row] = await tx.read.select().from(imports).where(eq(imports.id, importId)).for('update')
  if (!row) throw new AppError('not-found')
  const [job] = row.jobId
    ? await tx.read.select().from(jobs).where(eq(jobs.id, row.jobId))
    : [undefined]
  const state = stateOf({ import: row, job: job ?? null })
  if (!states.includes(state))
    throw new AppError('not-in-this-state', {
      message: `This import is in another state: ${IMPORT_STATE_LABELS[state].toLowerCase()}.`,
    })
  return row
}
