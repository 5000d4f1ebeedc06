import { randomUUID } from 'node:crypto'
import { setTimeout as wait } from 'node:timers/promises'
import {
  DEMONSTRATION_STUDIES,
  DEMONSTRATION_TEAM,
  type DemonstrationStudy,
} from '#db/seed/earlierStudies.ts'
import { type Answer, HttpBrowser } from './HttpBrowser.ts'

/**
 * Plays the demonstration through the product's own doors, as its people would: so its trail,
 * hashes, signatures and reports are real and only the data are invented. What an earlier, broken-off
 * run has made is left as it is and completed.
 */
const product = process.env.DEMONSTRATION_PRODUCT_URL
if (!product) throw new Error('DEMONSTRATION_PRODUCT_URL is not set.')

const LEAD = 'study-lead'
const OVERSIGHT = 'monitor-oversight'
const ANALYST = 'analyst-centre'
const browsers = new Map<string, HttpBrowser>()

for (const account of new Set([LEAD, ...DEMONSTRATION_TEAM.map((each) => each.account)])) {
  const browser = new HttpBrowser(product)
  await browser.signIn(account)
  browsers.set(account, browser)
}
for (const study of DEMONSTRATION_STUDIES) await play(study)

async function play(study: DemonstrationStudy): Promise<void> {
  const lead = as(LEAD)
  const studyId = (await findStudy(study.input.code)) ?? (await setUp(study))
  const { counts, lockedAt } = await done(lead.get(`/api/studies/${studyId}`))
  if (counts.subjects === 0) await bringIn(studyId, study)
  if (!study.locked) return
  if (!lockedAt) await lock(studyId)
  await analyse(studyId, study)
}

async function findStudy(code: string): Promise<string | undefined> {
  const studies = await done(as(LEAD).get('/api/studies'))
  return studies.find((each: { code: string }) => each.code === code)?.id
}

/** The study, then its team: people whom the provider has vouched for by now. */
async function setUp({ input }: DemonstrationStudy): Promise<string> {
  const lead = as(LEAD)
  const studyId = randomUUID()
  await done(lead.post('/api/studies', { ...input, id: studyId, demonstration: true }))
  const sites: { id: string; name: string }[] = await done(
    lead.get(`/api/studies/${studyId}/sites`),
  )
  for (const line of DEMONSTRATION_TEAM) {
    const { person } = await done(as(line.account).get('/api/me'))
    const siteId = 'site' in line ? sites.find((site) => site.name === line.site)?.id : null
    await done(
      lead.post(`/api/studies/${studyId}/members`, {
        id: randomUUID(),
        personId: person.id,
        role: line.role,
        duty: null,
        siteId,
      }),
    )
  }
  return studyId
}

async function bringIn(studyId: string, study: DemonstrationStudy): Promise<void> {
  const lead = as(LEAD)
  const uploaded = (await begunImport(studyId)) ?? (await upload(studyId, study.csv))
  const reading = await done(lead.get(`/api/imports/${uploaded.id}/columns`))
  const sites: { id: string; prefix: string }[] = await done(
    lead.get(`/api/studies/${studyId}/sites`),
  )
  const mapping = {
    format: { delimiter: ',', decimal: '.' },
    columns: reading.columns.map((column: { name: string }) => ({
      name: column.name,
      meaning: study.meanings[column.name] ?? { as: 'leaveOut' },
    })),
    siteId: null,
    sitesByWord: Object.fromEntries(
      Object.entries(study.siteWords).map(([word, prefix]) => [
        word,
        sites.find((site) => site.prefix === prefix)?.id,
      ]),
    ),
  }
  await done(
    lead.post(`/api/imports/${uploaded.id}/preview`, { mapping, version: uploaded.version }),
  )
  const previewed = await until(lead, uploaded.id, 'previewed')
  await done(
    lead.post(`/api/imports/${uploaded.id}/enter`, {
      leaveOutLines: [],
      reasonForChange: 'Invented data of the demonstration',
      version: previewed.version,
    }),
  )
  await until(lead, uploaded.id, 'entered')
}

/** What a broken-off run had uploaded. */
async function begunImport(studyId: string): Promise<Answer['body'] | undefined> {
  const imports: { id: string; state: string }[] = await done(
    as(LEAD).get(`/api/studies/${studyId}/imports`),
  )
  const begun = imports.find((each) => ['uploaded', 'previewed'].includes(each.state))
  return begun && done(as(LEAD).get(`/api/imports/${begun.id}`))
}

function upload(studyId: string, csv: string): Promise<Answer['body']> {
  const form = new FormData()
  form.set('file', new Blob([csv], { type: 'text/csv' }), 'demonstration.csv')
  return done(
    as(LEAD).send('POST', `/api/studies/${studyId}/imports`, { 'x-breathmark': '1' }, form),
  )
}

async function lock(studyId: string): Promise<void> {
  const reason = 'Demonstration of a lock'
  const page = await done(as(LEAD).get(`/api/studies/${studyId}/lock`))
  const open = page.locks.find((each: { state: string }) => each.state === 'requested')
  const request = open ?? { id: randomUUID(), version: 1 }
  if (!open)
    await done(as(LEAD).post(`/api/studies/${studyId}/locks`, { id: request.id, note: reason }))
  await as(OVERSIGHT).signAgain(OVERSIGHT, `lock.approve:${request.id}`)
  await done(
    as(OVERSIGHT).post(`/api/locks/${request.id}/approve`, {
      reasonForChange: reason,
      version: request.version,
    }),
  )
}

/** The stored analyses and a report of them, unless they are there. */
async function analyse(studyId: string, study: DemonstrationStudy): Promise<void> {
  const analyst = as(ANALYST)
  if ((await done(analyst.get(`/api/studies/${studyId}/reports`))).length > 0) return
  const [dataset] = await done(analyst.get(`/api/studies/${studyId}/datasets`))
  const analysisIds: string[] = []
  for (const request of study.analyses) {
    const id = randomUUID()
    await done(
      analyst.post(`/api/studies/${studyId}/analyses`, { ...request, id, datasetId: dataset.id }),
    )
    analysisIds.push(id)
  }
  await done(
    analyst.post(`/api/studies/${studyId}/reports`, {
      id: randomUUID(),
      title: 'Interim report 1 (invented data)',
      datasetId: dataset.id,
      analysisIds,
    }),
  )
}

function as(account: string): HttpBrowser {
  const browser = browsers.get(account)
  if (!browser) throw new Error(`${account} is not in the demonstration.`)
  return browser
}

/** The body of an answer that must be a success. */
async function done(answer: Promise<Answer>): Promise<Answer['body']> {
  const { status, body } = await answer
  if (status >= 300) throw new Error(`Answered ${status}: ${JSON.stringify(body)}`)
  return body
}

async function until(
  browser: HttpBrowser,
  importId: string,
  state: string,
): Promise<Answer['body']> {
  for (let tries = 0; tries < 300; tries++) {
    const found = await done(browser.get(`/api/imports/${importId}`))
    if (found.state === state) return found
    if (found.state === 'failed')
      throw new Error('The file of the demonstration could not be read.')
    await wait(100)
  }
  throw new Error(`The file of the demonstration was not ${state} in time.`)
}
