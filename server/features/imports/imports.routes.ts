import { z } from 'zod'
import { reader } from '#db/client.ts'
import type { Actor } from '#server/changes/actor.ts'
import { change } from '#server/changes/change.ts'
import { route } from '#server/http/route.ts'
import { id } from '#shared/schemas/common.ts'
import {
  type DataImport,
  dataImport,
  importDiscardRequest,
  importEnterRequest,
  importPreviewRequest,
  importReading,
  importReadingQuery,
  importRowPage,
  importRowQuery,
  importSummary,
} from '#shared/schemas/import.ts'
import { MOST_BYTES } from './importLimits.ts'
import {
  allRows,
  earlierImportOfSameFile,
  getImport,
  listImports,
  listRows,
} from './imports.reads.ts'
import {
  discardImport,
  enterImport,
  previewImport,
  readImportColumns,
  uploadImport,
} from './imports.service.ts'
import { toImport, toImportRow, toSummary } from './imports.view.ts'

const inStudy = z.object({ studyId: id })
const oneImport = z.object({ importId: id })
const ofImport = ({ importId }: { importId: string }) => ({ importId })

export const importRoutes = [
  route({
    method: 'get',
    path: '/api/studies/:studyId/imports',
    action: 'import.list',
    params: inStudy,
    of: ({ studyId }) => ({ studyId }),
    returns: z.array(importSummary),
    handle: async ({ params }) => (await listImports(reader(), params.studyId)).map(toSummary),
  }),
  route({
    method: 'post',
    path: '/api/studies/:studyId/imports',
    status: 201,
    action: 'import.upload',
    uploadBytes: MOST_BYTES,
    params: inStudy,
    of: ({ studyId }) => ({ studyId }),
    returns: dataImport,
    handle: async ({ actor, params, file }) =>
      shown(actor, await uploadImport(actor, params.studyId, file?.buffer)),
  }),
  route({
    method: 'get',
    path: '/api/imports/:importId',
    action: 'import.read',
    params: oneImport,
    of: ofImport,
    returns: dataImport,
    handle: ({ actor, params }) => shown(actor, params.importId),
  }),
  route({
    method: 'get',
    path: '/api/imports/:importId/columns',
    action: 'import.read',
    params: oneImport,
    query: importReadingQuery,
    of: ofImport,
    returns: importReading,
    handle: ({ params, allowed, query }) =>
      readImportColumns({ ...params, studyId: allowed.studyId }, query.delimiter),
  }),
  route({
    method: 'post',
    path: '/api/imports/:importId/preview',
    status: 202,
    action: 'import.preview',
    params: oneImport,
    body: importPreviewRequest,
    of: ofImport,
    returns: dataImport,
    handle: async ({ actor, params, body }) => {
      await previewImport(actor, params.importId, body)
      return shown(actor, params.importId)
    },
  }),
  route({
    method: 'get',
    path: '/api/imports/:importId/rows',
    action: 'import.read',
    params: oneImport,
    query: importRowQuery,
    of: ofImport,
    returns: importRowPage,
    handle: async ({ params, query }) => {
      const page = await listRows(reader(), params.importId, query)
      return { ...page, items: page.items.map(toImportRow) }
    },
  }),
  route({
    method: 'post',
    path: '/api/imports/:importId/enter',
    status: 202,
    action: 'import.enter',
    params: oneImport,
    body: importEnterRequest,
    of: ofImport,
    returns: dataImport,
    handle: async ({ actor, params, body }) => {
      await enterImport(actor, params.importId, body)
      return shown(actor, params.importId)
    },
  }),
  route({
    method: 'post',
    path: '/api/imports/:importId/discard',
    action: 'import.discard',
    params: oneImport,
    body: importDiscardRequest,
    of: ofImport,
    returns: dataImport,
    handle: async ({ actor, params, body }) => {
      await discardImport(actor, params.importId, body)
      return shown(actor, params.importId)
    },
  }),
  route({
    method: 'get',
    path: '/api/imports/:importId/codes.csv',
    action: 'import.readCodes',
    params: oneImport,
    of: ofImport,
    handle: async ({ actor, params }) => {
      const { import: found } = await getImport(reader(), params.importId)
      await change({ actor, action: 'import.readCodes', of: params }, async (tx) => {
        tx.note({
          recordType: 'import',
          recordId: params.importId,
          recordLabel: `no. ${found.number}`,
        })
      })
      const rows = await allRows(reader(), params.importId)
      const lines = rows.flatMap((row) =>
        row.subjectCode ? [`${row.line},${row.subjectCode}`] : [],
      )
      return {
        bytes: Buffer.from(['line,subject_code', ...lines, ''].join('\r\n')),
        type: 'text/csv; charset=utf-8',
        name: `import-${found.number}-codes.csv`,
      }
    },
  }),
]

async function shown(actor: Actor, importId: string): Promise<DataImport> {
  const row = await getImport(reader(), importId)
  return toImport(row, await earlierImportOfSameFile(reader(), row.import), actor.personId)
}
