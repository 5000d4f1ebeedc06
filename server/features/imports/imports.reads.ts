import { and, asc, count, desc, eq, gt, inArray, lt, ne, notInArray } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { analytes } from '#db/schema/analytes.ts'
import { importChunks } from '#db/schema/importChunks.ts'
import { importRows } from '#db/schema/importRows.ts'
import { imports } from '#db/schema/imports.ts'
import { jobs } from '#db/schema/jobs.ts'
import { people } from '#db/schema/people.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { sites } from '#db/schema/sites.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { ImportRowQuery } from '#shared/schemas/import.ts'
import type { RowFate } from '#shared/terms/importState.ts'

const withJob = (read: Reader) =>
  read
    .select({ import: imports, job: jobs, uploadedByName: people.name })
    .from(imports)
    .leftJoin(people, eq(people.id, imports.uploadedBy))
    .leftJoin(jobs, eq(jobs.id, imports.jobId))
    .$dynamic()

export type ImportWithJob = Awaited<ReturnType<typeof getImport>>

/** One import with its latest job. @throws AppError not-found */
export async function getImport(read: Reader, importId: string) {
  const [row] = await withJob(read).where(eq(imports.id, importId))
  if (!row) throw new AppError('not-found')
  return row
}

/** All imports of a study, the latest first. */
export const listImports = (read: Reader, studyId: string) =>
  withJob(read).where(eq(imports.studyId, studyId)).orderBy(desc(imports.number))

type SameFile = { studyId: string; fileHash: string }

/** The earliest import before this one of the same bytes that is not discarded. */
export async function earlierImportOfSameFile(
  read: Reader,
  { studyId, fileHash, number }: SameFile & { number: number },
) {
  const [row] = await withJob(read)
    .where(
      and(
        eq(imports.studyId, studyId),
        eq(imports.fileHash, fileHash),
        ne(imports.state, 'discarded'),
        lt(imports.number, number),
      ),
    )
    .orderBy(asc(imports.number))
    .limit(1)
  return row
}

/** An import of these bytes that is neither entered nor discarded. */
export async function unfinishedImportOfSameFile(read: Reader, { studyId, fileHash }: SameFile) {
  const [row] = await read
    .select({ id: imports.id, number: imports.number })
    .from(imports)
    .where(
      and(
        eq(imports.studyId, studyId),
        eq(imports.fileHash, fileHash),
        notInArray(imports.state, ['entered', 'discarded']),
      ),
    )
    .limit(1)
  return row
}

/** What suggestions and checks need to know of the study. */
export async function studyTerms(read: Reader, studyId: string) {
  const [protocol] = await read
    .select({ document: protocolVersions.document })
    .from(protocolVersions)
    .where(eq(protocolVersions.studyId, studyId))
    .orderBy(desc(protocolVersions.number))
    .limit(1)
  return {
    targetCondition: protocol?.document.targetCondition ?? '',
    analytes: await read
      .select({
        id: analytes.id,
        key: analytes.key,
        name: analytes.name,
        formula: analytes.formula,
        unit: analytes.unit,
      })
      .from(analytes)
      .where(eq(analytes.studyId, studyId))
      .orderBy(asc(analytes.name)),
    sites: await read
      .select({ id: sites.id, name: sites.name, prefix: sites.prefix })
      .from(sites)
      .where(eq(sites.studyId, studyId))
      .orderBy(asc(sites.name)),
  }
}

/** A piece of the file. @throws AppError not-in-this-state when the bytes are gone */
export async function filePiece(read: Reader, importId: string, position: number): Promise<Buffer> {
  const [row] = await read
    .select({ bytes: importChunks.bytes })
    .from(importChunks)
    .where(and(eq(importChunks.importId, importId), eq(importChunks.position, position)))
  if (!row)
    throw new AppError('not-in-this-state', {
      message: 'The file is no longer kept: it was entered or discarded.',
    })
  return row.bytes
}

/** A page of rows by line, those of one fate or all. */
export async function listRows(read: Reader, importId: string, query: ImportRowQuery) {
  const limit = query.limit ?? 50
  const after = Number(query.after ?? 0)
  if (!Number.isInteger(after) || after < 0)
    throw new AppError('invalid', { fields: { after: 'This is not a key of a page.' } })
  const filter = and(
    eq(importRows.importId, importId),
    query.fate ? eq(importRows.fate, query.fate) : undefined,
  )
  const [totals] = await read.select({ total: count() }).from(importRows).where(filter)
  const rows = await read
    .select()
    .from(importRows)
    .where(and(filter, gt(importRows.line, after)))
    .orderBy(asc(importRows.line))
    .limit(limit + 1)
  const items = rows.slice(0, limit)
  const last = items.at(-1)
  return {
    items,
    total: totals?.total ?? 0,
    next: rows.length > limit && last ? String(last.line) : null,
  }
}

/** The rows of an import by line, as the preview left them. */
export const allRows = (read: Reader, importId: string) =>
  read
    .select()
    .from(importRows)
    .where(eq(importRows.importId, importId))
    .orderBy(asc(importRows.line))

/** Which of these lines hold a row of a fate. */
export async function linesWithFate(
  read: Reader,
  importId: string,
  fate: RowFate,
  lines: readonly number[],
): Promise<Set<number>> {
  if (lines.length === 0) return new Set()
  const rows = await read
    .select({ line: importRows.line })
    .from(importRows)
    .where(
      and(
        eq(importRows.importId, importId),
        eq(importRows.fate, fate),
        inArray(importRows.line, [...lines]),
      ),
    )
  return new Set(rows.map((row) => row.line))
}
