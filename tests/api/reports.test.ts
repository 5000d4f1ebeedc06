import { createHash, randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { reader } from '#db/client.ts'
import { analyses } from '#db/schema/analyses.ts'
import { mails } from '#db/schema/mails.ts'
import { reportFiles } from '#db/schema/reportFiles.ts'
import { reports } from '#db/schema/reports.ts'
import { closedPart } from '#server/features/reports/parts/closedPart.ts'
import { openPart } from '#server/features/reports/parts/openPart.ts'
import { readReportSource } from '#server/features/reports/reportSource.ts'
import { renderPdf } from '#server/reports/renderPdf.ts'
import type { Analysis } from '#shared/schemas/analysis.ts'
import type { Report } from '#shared/schemas/report.ts'
import { type Api, aKey, startApi, type TestPerson } from '../support/api.ts'
import { fillStudy, lockThroughHttp, teamOf } from '../support/earlierData.ts'
import { inventedSubjects } from '../support/inventedSubjects.ts'
import { inOneLine, pdfPages } from '../support/pdfText.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

const ACCURACY = {
  kind: 'accuracy',
  analyteKey: 'ammonia',
  direction: 'higher',
  sessionRule: 'first',
  cutOff: 1000,
  confidence: 0.95,
  prevalence: 0.2,
}
const AGREEMENT = {
  kind: 'agreement',
  analyteKey: 'ammonia',
  sessionRule: 'first',
  confidence: 0.95,
  acceptance: { lower: -100, upper: 100 },
}

/** A locked study with three stored analyses, all of it made through the API but the subjects. */
async function studyWithAnalyses(subjects = 214) {
  const study = await api.given.study()
  await fillStudy(api, study, inventedSubjects(subjects))
  const team = await teamOf(api, study)
  const { datasetId, datasetHash } = await lockThroughHttp(api, study, team)
  const run = async (title: string, parameters: object): Promise<Analysis> => {
    const response = await api
      .as(team.analyst)
      .post(`/api/studies/${study.id}/analyses`)
      .send({ id: aKey(), datasetId, title, parameters })
      .expect(201)
    return response.body
  }
  const accuracy = await run('Ammonia against the reference', ACCURACY)
  const agreement = await run('Ammonia against the analyser', AGREEMENT)
  await run('Another cut-off', { ...ACCURACY, cutOff: 800 })
  return { study, datasetId, datasetHash: String(datasetHash), accuracy, agreement, ...team }
}
type Made = Awaited<ReturnType<typeof studyWithAnalyses>>

const request = (of: Made, more: object = {}) => ({
  id: aKey(),
  title: 'Earlier data, first look',
  datasetId: of.datasetId,
  analysisIds: [of.accuracy.id, of.agreement.id],
  ...more,
})

const ask = (of: Made, more: object = {}, person: TestPerson = of.analyst) =>
  api.as(person).post(`/api/studies/${of.study.id}/reports`).send(request(of, more))

const listed = async (of: Made, person: TestPerson = of.lead): Promise<Report[]> =>
  (await api.as(person).get(`/api/studies/${of.study.id}/reports`).expect(200)).body

/** Asks for a report and works off the queue. */
async function issued(of: Made): Promise<Report> {
  const { body } = await ask(of).expect(202)
  await api.runJobs()
  return (await listed(of)).find((report) => report.id === body.id)!
}

async function download(person: TestPerson, reportId: string, part: 'open' | 'closed') {
  const response = await api
    .as(person)
    .get(`/api/reports/${reportId}/${part}.pdf`)
    .buffer(true)
    .parse((stream, done) => {
      const pieces: Buffer[] = []
      stream.on('data', (piece: Buffer) => pieces.push(piece))
      stream.on('end', () => done(null, Buffer.concat(pieces)))
    })
  return { status: response.status, headers: response.headers, bytes: response.body as Buffer }
}

const sha256 = (bytes: Buffer) => createHash('sha256').update(bytes).digest('hex')

/** As JavaScript rounds, apart from how the product formats: a true minus is all they share. */
const plain = (value: number, decimals: number) => value.toFixed(decimals).replace('-', '−')

describe('a report', () => {
  let made: Made
  let report: Report
  beforeAll(async () => {
    made = await studyWithAnalyses()
    report = await issued(made)
  })

  test('is prepared first, then issued in two parts under the hashes of their bytes', async () => {
    const { body } = await ask(made).expect(202)
    expect(body).toMatchObject({ state: 'preparing', files: [], analysisCount: 2 })
    expect(body.jobId).not.toBeNull()
    await api.as(made.lead).get(`/api/reports/${body.id}/open.pdf`).expect(409)
    await api.runJobs()
    const [latest] = await listed(made)
    expect(latest).toMatchObject({ id: body.id, number: 2, state: 'issued', jobId: null })
    expect(latest!.files.map((file) => file.part)).toEqual(['open', 'closed'])
    for (const { part, sha256: stated, bytes, pages } of latest!.files) {
      const file = await download(made.analyst, body.id, part)
      expect(file.status).toBe(200)
      expect(file.headers['content-type']).toBe('application/pdf')
      expect(file.headers['content-disposition']).toBe(
        `inline; filename="${made.study.code}-report-2-${part}-part.pdf"`,
      )
      expect(sha256(file.bytes)).toBe(stated)
      expect(file.bytes.length).toBe(bytes)
      expect(pdfPages(file.bytes)).toHaveLength(pages)
    }
  })

  test('prints in its closed part the numbers that the API gives, with n/N, intervals and methods', async () => {
    const text = inOneLine(pdfPages((await download(made.monitor, report.id, 'closed')).bytes))
    const { result } = made.accuracy
    if (result.kind !== 'accuracy' || !result.area || !result.atCutOff) throw new Error('No area.')
    const { area, atCutOff, counts } = result
    expect(text).toContain(
      `Area under the curve ${plain(area.estimate, 3)} (${plain(area.lower!, 3)} to ${plain(area.upper!, 3)})`,
    )
    expect(text).toContain(`95 % interval, ${area.method}`)
    expect(text).toContain(
      `${counts.present + counts.absent} of ${counts.subjects} subjects: ${counts.present} present, ${counts.absent} absent`,
    )
    for (const {
      measure,
      numerator,
      denominator,
      estimate,
      lower,
      upper,
      method,
    } of atCutOff.measures) {
      const decimals = denominator === null && !measure.includes('PredictiveValue') ? 2 : 3
      const fraction = denominator === null ? '' : `${numerator}/${denominator} `
      expect(text).toContain(
        `${fraction}${plain(estimate!, decimals)} ${plain(lower!, decimals)} to ${plain(upper!, decimals)} ${method}`,
      )
    }
    const { truePositives, falsePositives, falseNegatives, trueNegatives } = atCutOff.table
    expect(text).toContain(`Positive ${truePositives} ${falsePositives}`)
    expect(text).toContain(`Negative ${falseNegatives} ${trueNegatives}`)
  })

  test('prints bias and limits of agreement with one number of decimals, and how they stand to what is acceptable', async () => {
    const text = inOneLine(pdfPages((await download(made.monitor, report.id, 'closed')).bytes))
    const { result } = made.agreement
    if (result.kind !== 'agreement') throw new Error('No agreement.')
    // A standard deviation between 10 and 100 ppb gives one decimal.
    expect(result.sd).toBeGreaterThan(10)
    expect(result.sd).toBeLessThan(100)
    for (const [label, line] of [
      ['Upper limit', result.upperLimit],
      ['Bias', result.bias],
      ['Lower limit', result.lowerLimit],
    ] as const)
      expect(text).toContain(
        `${label} ${plain(line.estimate, 1)} ${plain(line.lower!, 1)} to ${plain(line.upper!, 1)}`,
      )
    expect(text).toContain('Acceptable: −100 to 100 ppb.')
  })

  test('says who is left out and why, what is exploratory, and how many analyses were run', async () => {
    const text = inOneLine(pdfPages((await download(made.analyst, report.id, 'closed')).bytes))
    expect(text).toContain('2 of 3 analyses run on this dataset are shown')
    expect(text).toContain('Reference outcome indeterminate 8')
    expect(text).toContain('Exploratory from these data: Youden')
    expect(text).toContain('Planned by the protocol 1,000 ppb')
    expect(text).toContain(`seed ${made.accuracy.seed}`)
    expect(text).toContain(`statistics ${made.accuracy.statisticsVersion}`)
    expect(text).toContain(`by ${made.analyst.name}`)
  })

  test('carries caution, stamp, dataset hash and page number on every page of both parts', async () => {
    for (const part of ['open', 'closed'] as const) {
      const pages = pdfPages((await download(made.analyst, report.id, part)).bytes)
      expect(pages.length).toBeGreaterThan(part === 'open' ? 0 : 2)
      for (const [at, page] of pages.entries()) {
        expect(page).toContain('For research use only')
        expect(page).toContain('Unblinded: earlier data')
        expect(page).toContain(made.datasetHash)
        expect(page).toContain(`page ${at + 1} of ${pages.length}`)
      }
    }
  })

  test('tells in its open part numbers and completeness, and nothing that a result could be read from', async () => {
    const text = inOneLine(pdfPages((await download(made.lead, report.id, 'open')).bytes))
    expect(text).toContain('North ward (N04) 214 60 356.7 %')
    // Every 23rd of 214 lacks the sensor value, every 11th the analyser's, every 29th a decision.
    expect(text).toContain('Ammonia, sensor value 204/214 95.3 % 10')
    expect(text).toContain('Ammonia, reference analyser value 194/214 90.7 % 20')
    expect(text).toContain('Reference outcome decided 206/214 96.3 % 8')
    expect(text).toContain('Final lock 1 Approved')
    const { result } = made.accuracy
    if (result.kind !== 'accuracy') throw new Error('No accuracy.')
    const { present, absent } = result.counts
    for (const told of [
      /sensitivity/i,
      /specificity/i,
      /likelihood/i,
      /area under/i,
      /\bpresent\b/,
      /\babsent\b/,
      new RegExp(`\\b${present}\\b`),
      new RegExp(`\\b${absent}\\b`),
      new RegExp(plain(result.area!.estimate, 3)),
      new RegExp(made.accuracy.title),
    ])
      expect(text).not.toMatch(told)
  })

  test('keeps its closed part from coordinators and from other studies', async () => {
    const outsider = await api.given.member(await api.given.study(), { role: 'monitor' })
    expect((await download(made.lead, report.id, 'closed')).status).toBe(403)
    expect((await download(outsider, report.id, 'closed')).status).toBe(404)
    expect((await download(outsider, report.id, 'open')).status).toBe(404)
    expect((await download(made.monitor, report.id, 'closed')).status).toBe(200)
    expect((await download(made.lead, report.id, 'open')).status).toBe(200)
  })

  test('is in the trail with the hashes of its files, and so is each opening of a part', async () => {
    await download(made.monitor, report.id, 'closed')
    const events = await api.auditEvents(made.study.id)
    const opened = events.filter((event) => event.event === 'report.closedPartOpened').at(-1)
    expect(opened).toMatchObject({
      recordType: 'report',
      recordId: report.id,
      recordLabel: 'no. 1',
      personId: made.monitor.id,
    })
    const stored = events.filter((event) => event.recordType === 'reportFile').slice(0, 2)
    expect(stored.map((event) => event.recordLabel)).toEqual(['open part', 'closed part'])
    expect(stored.every((event) => event.recordId === report.id)).toBe(true)
    const page = await api
      .as(made.monitor)
      .get(`/api/studies/${made.study.id}/audit-events`)
      .query({ event: 'report.issued', limit: '200' })
      .expect(200)
    for (const file of report.files) expect(page.text).toContain(file.sha256)
  })

  test('is the same bytes when it is written again from its record', async () => {
    const source = await readReportSource(reader(), report.id)
    const again = await readReportSource(reader(), report.id)
    for (const [part, write] of [
      ['open', openPart],
      ['closed', closedPart],
    ] as const) {
      const { sha256: stated } = report.files.find((file) => file.part === part)!
      expect(sha256(await renderPdf(write(source)))).toBe(stated)
      expect(sha256(await renderPdf(write(again)))).toBe(stated)
    }
  })

  test('cannot be changed in the database once a part is stored', async () => {
    await expect(
      api.fixtures.update(reportFiles).set({ pages: 1 }).where(eq(reportFiles.reportId, report.id)),
    ).rejects.toMatchObject({ cause: { errno: 1644 } })
  })
})

describe('asking for a report', () => {
  let made: Made
  beforeAll(async () => {
    made = await studyWithAnalyses(80)
  })

  const refused = async (more: object, fields: Record<string, string>) => {
    const before = await api.auditEvents(made.study.id)
    const response = await ask(made, more)
    expect(response.status).toBe(422)
    expect(response.body.fields).toEqual(fields)
    expect(await listed(made)).toEqual([])
    expect(await api.auditEvents(made.study.id)).toEqual(before)
  }

  test('without a title, a dataset or an analysis names each field', async () => {
    await refused(
      { title: ' ', datasetId: '', analysisIds: [] },
      {
        title: 'Please fill this in.',
        datasetId: 'Please choose a dataset.',
        analysisIds: 'Choose at least one stored analysis.',
      },
    )
    await refused(
      { analysisIds: [made.accuracy.id, made.accuracy.id] },
      { analysisIds: 'Each analysis once.' },
    )
  })

  test("on another study's dataset or analyses is refused as if they did not exist", async () => {
    const other = await studyWithAnalyses(60)
    await refused(
      { datasetId: other.datasetId },
      { datasetId: 'There is no such dataset in this study.' },
    )
    await refused(
      { analysisIds: [made.accuracy.id, other.accuracy.id] },
      { analysisIds: 'A report shows stored analyses of its own dataset alone.' },
    )
  })

  test('is for analysts alone', async () => {
    await ask(made, {}, made.lead).expect(403)
    await ask(made, {}, made.monitor).expect(403)
  })

  test('tells each reader by letter which parts are there, how long they are and where, and nothing else', async () => {
    const report = await issued(made)
    const letters = await api.fixtures.select().from(mails).where(eq(mails.studyId, made.study.id))
    const to = (person: TestPerson) =>
      letters.filter((letter) => letter.recipient === `${person.id}@hospital.example`)
    const pages = (part: string) => report.files.find((file) => file.part === part)!.pages
    for (const person of [made.monitor, made.analyst, made.lead]) {
      const [letter, ...more] = to(person)
      expect(more).toEqual([])
      expect(letter).toMatchObject({ state: 'waiting' })
      expect(letter!.text).toContain(`http://127.0.0.1:4173/studies/${made.study.id}/reports`)
      expect(letter!.text).toMatch(new RegExp(`Open part: ${pages('open')} pages?`))
      expect(letter!.text.includes(`Closed part: ${pages('closed')} pages`)).toBe(
        person !== made.lead,
      )
      // Neither what was typed nor a number with decimals.
      const words = `${letter!.subject} ${letter!.text}`.replace(/http\S+/g, '')
      expect(words).not.toMatch(/first look|\d\.\d|ppb/i)
      expect(words).not.toContain(made.datasetHash.slice(0, 8))
    }
    expect(letters).toHaveLength(3)
  })
})

describe('a report that cannot be written', () => {
  /** A stored analysis whose result no build can read. */
  async function brokenAnalysis(of: Made): Promise<string> {
    const [row] = await api.fixtures.select().from(analyses).where(eq(analyses.id, of.accuracy.id))
    const id = randomUUID()
    await api.fixtures
      .insert(analyses)
      .values({ ...row!, id, number: 99, result: '{"kind":"accuracy"}' })
    return id
  }

  test('says so with words that tell nothing, keeps no part, and can be tried again', async () => {
    const made = await studyWithAnalyses(60)
    const { body } = await ask(made, { analysisIds: [await brokenAnalysis(made)] }).expect(202)
    await api.runJobs()
    const [failed] = await listed(made)
    expect(failed).toMatchObject({ id: body.id, state: 'failed', files: [], jobId: null })
    expect(failed!.failure).toMatch(/^Something went wrong on our side \(job [0-9a-f-]{36}\)\.$/)
    const events = await api.auditEvents(made.study.id)
    expect(events.at(-1)).toMatchObject({ event: 'report.failed', recordId: body.id })

    const again = await api.as(made.analyst).post(`/api/reports/${body.id}/try-again`).expect(202)
    expect(again.body).toMatchObject({ state: 'preparing', failure: null, number: 1 })
    await api.as(made.analyst).post(`/api/reports/${body.id}/try-again`).expect(409)
    await api.as(made.analyst).post(`/api/jobs/${again.body.jobId}/cancel`).send({}).expect(200)
    await api.runJobs()
    const [stopped] = await listed(made)
    expect(stopped).toMatchObject({
      state: 'failed',
      failure: 'Stopped on request. Nothing was changed.',
    })
  })

  test('fails for good when whoever asked has left the team meanwhile, and sends no letter', async () => {
    const made = await studyWithAnalyses(60)
    const line = await api.given.memberLine(made.study, { role: 'analyst' })
    await ask(made, {}, line.person).expect(202)
    await api.given.endLine(line)
    await api.runJobs()
    const [report] = await listed(made)
    expect(report).toMatchObject({ state: 'failed', files: [] })
    expect(await api.fixtures.select().from(mails).where(eq(mails.studyId, made.study.id))).toEqual(
      [],
    )
    expect(
      await api.fixtures
        .select({ id: reports.id })
        .from(reports)
        .where(eq(reports.studyId, made.study.id)),
    ).toHaveLength(1)
  })
})

test('18,000 subjects are written up within seconds', async () => {
  const made = await studyWithAnalyses(18_000)
  await ask(made).expect(202)
  const startedAt = performance.now()
  await api.runJobs()
  const seconds = (performance.now() - startedAt) / 1000
  const [report] = await listed(made)
  expect(report).toMatchObject({ state: 'issued' })
  // Alone on the machine about 4 s; the rest is for what else runs on it.
  expect(seconds).toBeLessThan(25)
  const closed = await download(made.analyst, report!.id, 'closed')
  expect(inOneLine(pdfPages(closed.bytes))).toContain('of 18,000 subjects')
}, 180_000)
