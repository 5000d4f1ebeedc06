import type { ColumnMeaning, DataImport, ImportMapping, ImportRow } from '#shared/schemas/import.ts'
import type { Api, Client, TestPerson } from './api.ts'

type Study = Awaited<ReturnType<Api['given']['study']>>

/** A study of earlier data with its lead, and what a lead does with a file in it. */
export async function studyWithLead(api: Api) {
  const study = await api.given.study({ kind: 'earlierData' })
  const lead = await api.given.member(study, { role: 'coordinator', duty: 'studyLead' })
  return { study, lead, desk: importDesk(api, study, lead) }
}

export type ImportDesk = ReturnType<typeof importDesk>

/** A lead's doings with files, all of them through the API. */
export function importDesk(api: Api, study: Study, lead: TestPerson) {
  const client: Client = api.as(lead)

  const upload = (content: string | Buffer, name = 'file.csv') =>
    client
      .post(`/api/studies/${study.id}/imports`)
      .attach('file', Buffer.isBuffer(content) ? content : Buffer.from(content), name)

  async function uploaded(content: string | Buffer): Promise<DataImport> {
    const response = await upload(content)
    if (response.status !== 201) throw new Error(JSON.stringify(response.body))
    return response.body
  }

  /** Meanings by heading; what is not named is left out. */
  const mappingFor = (
    of: { columns: readonly { name: string }[] },
    meanings: Record<string, ColumnMeaning>,
    more: Partial<ImportMapping> & { declared?: Record<string, string> } = {},
  ): ImportMapping => {
    const { declared = {}, ...rest } = more
    return {
      format: { delimiter: ',', decimal: '.' },
      siteId: study.north.id,
      sitesByWord: {},
      columns: of.columns.map(({ name }) => ({
        name,
        meaning: meanings[name] ?? { as: 'leaveOut' },
        ...(declared[name] ? { declared: declared[name] } : {}),
      })),
      ...rest,
    }
  }

  const get = async (importId: string): Promise<DataImport> =>
    (await client.get(`/api/imports/${importId}`)).body

  const preview = async (of: { id: string }, mapping: ImportMapping) =>
    client
      .post(`/api/imports/${of.id}/preview`)
      .send({ mapping, version: (await get(of.id)).version })

  const rows = async (of: { id: string }, fate?: string): Promise<ImportRow[]> =>
    (
      await client
        .get(`/api/imports/${of.id}/rows`)
        .query({ limit: '200', ...(fate ? { fate } : {}) })
    ).body.items

  const enter = async (of: { id: string }, leaveOutLines: number[] = []) =>
    client.post(`/api/imports/${of.id}/enter`).send({
      leaveOutLines,
      reasonForChange: 'Earlier data come in',
      version: (await get(of.id)).version,
    })

  /** Uploads, maps and judges a file. */
  async function judged(
    content: string,
    meanings: Record<string, ColumnMeaning>,
    more: Parameters<typeof mappingFor>[2] = {},
  ): Promise<DataImport> {
    const of = await uploaded(content)
    const columns = (
      await client
        .get(`/api/imports/${of.id}/columns`)
        .query(more.format ? { delimiter: more.format.delimiter } : {})
    ).body
    const response = await preview(of, mappingFor(columns, meanings, more))
    if (response.status !== 202) throw new Error(JSON.stringify(response.body))
    await api.runJobs()
    return get(of.id)
  }

  /** The same, and all that is right entered. */
  async function entered(...file: Parameters<typeof judged>): Promise<DataImport> {
    const of = await judged(...file)
    const response = await enter(of)
    if (response.status !== 202) throw new Error(JSON.stringify(response.body))
    await api.runJobs()
    return get(of.id)
  }

  return { client, upload, uploaded, mappingFor, get, preview, rows, enter, judged, entered }
}

/** Meanings of the small files in these tests. */
export const MEANINGS = {
  id: { as: 'subject' },
  visit: { as: 'sessionNumber' },
  sex: { as: 'sex', F: ['F'], M: ['M'], other: [], unknown: [] },
  age: { as: 'ageYears', andOver: null },
  nh3: { as: 'sensorValue', analyteKey: 'ammonia' },
  low: { as: 'belowLod', analyteKey: 'ammonia' },
  ref: { as: 'referenceValue', analyteKey: 'ammonia' },
  label: { as: 'outcome', present: ['1'], absent: ['0'], indeterminate: ['?'] },
  diet: { as: 'covariate', key: 'diet' },
} as const satisfies Record<string, ColumnMeaning>
