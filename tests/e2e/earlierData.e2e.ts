import { join, resolve } from 'node:path'
import type { Page } from '@playwright/test'
import { expect, test } from '../support/browserTest.ts'
import { inOneLine, pdfPages } from '../support/pdfText.ts'
import { hasReference } from '../support/referenceFolder.ts'
import { addToTeam, bringIn, issueReport, lockData, setUpStudy, storeAnalysis } from './team.ts'

const root = join(import.meta.dirname, '../..')
const own = (name: string) => join(root, 'tests/statistics/references/data', name)
/** Read where they lie, never copied into the project. */
const lent = (path: string) => resolve(process.env.BREATHMARK_REFERENCES ?? '../shared', path)

type People = { lead: Page; monitor: Page; analyst: Page }

/** The three people of a study of earlier data, each in a browser of their own. */
async function people(pageOf: (account: string) => Promise<Page>): Promise<People> {
  return {
    lead: await pageOf('study-lead'),
    monitor: await pageOf('monitor-oversight'),
    analyst: await pageOf('analyst-centre'),
  }
}

async function addTheOthers(lead: Page, studyId: string): Promise<void> {
  await addToTeam(lead, studyId, [
    ['Monitor, oversight', 'Monitor'],
    ['Analyst, coordinating centre', 'Analyst'],
  ])
}

/** Opens a part as its reader would and reads the text of its pages. */
async function openPart(page: Page, studyId: string, part: 'open' | 'closed'): Promise<string> {
  await page.goto(`/studies/${studyId}/reports`)
  const link = page.locator(`a[href$="/${part}.pdf"]`).first()
  await expect(link).toBeVisible()
  const response = await page.request.get((await link.getAttribute('href'))!)
  expect(response.headers()['content-type']).toBe('application/pdf')
  return inOneLine(pdfPages(await response.body()))
}

test('a subarachnoid-haemorrhage series goes from its file to the PDF with the published area of s100b', async ({
  pageOf,
}) => {
  const path = lent('reference/data/asah.csv')
  test.skip(
    !hasReference('reference/data/asah.csv'),
    'asah.csv is not shipped with the project and does not lie beside it.',
  )
  const { lead, monitor, analyst } = await people(pageOf)
  const studyId = await setUpStudy(lead, {
    title: 'Markers after haemorrhage, earlier data',
    condition: 'Poor outcome',
    analytes: [
      { name: 'S100B', unit: 'µg/L' },
      { name: 'NDKA', unit: 'µg/L' },
    ],
    biomarkers: [{ analyte: 'S100B', cutOff: '0.2' }, { analyte: 'NDKA' }],
    sites: [{ name: 'One centre', prefix: 'Z01' }],
  })
  await addTheOthers(lead, studyId)
  await bringIn(lead, studyId, {
    path,
    meanings: {
      id: 'Subject',
      label: 'Reference outcome',
      s100b: 'Sensor value',
      ndka: 'Sensor value',
      wfns: 'Left out',
      gender: 'Sex',
      age: 'Age in years',
    },
    analytes: { s100b: 'S100B', ndka: 'NDKA' },
    outcome: { column: 'label', present: '1', absent: '0' },
    siteOfAllRows: 'One centre',
    rows: /^Enter 113 rows$/,
  })
  await lockData(lead, monitor, studyId)

  await analyst.goto(`/studies/${studyId}/results`)
  await analyst.getByRole('link', { name: 'Explore accuracy' }).first().click()
  // Turck et al. 2010 with pROC (Robin et al. 2011): area 0.731, DeLong 0.630 to 0.833.
  await expect(
    analyst.getByRole('heading', { name: /0\.731\s*\(0\.630 to 0\.833\)/ }),
  ).toBeVisible()
  await storeAnalysis(analyst)
  await expect(
    analyst.getByRole('heading', { name: /0\.731\s*\(0\.630 to 0\.833\)/ }),
  ).toBeVisible()
  // Package pROC's own tests: s100b against ndka, paired DeLong, p = 0.1643.
  await analyst.goto(`/studies/${studyId}/results/compare`)
  for (const marker of ['S100B', 'NDKA']) await analyst.getByLabel(marker, { exact: true }).check()
  await analyst.getByLabel('Title').fill('S100B against NDKA')
  await analyst.getByRole('button', { name: 'Compute and store' }).click()
  await expect(analyst.getByText(/0\.164/).first()).toBeVisible({ timeout: 60_000 })
  // R's glm on s100b and ndka as they are; the area shown first is the corrected one.
  await analyst.goto(`/studies/${studyId}/results/panel`)
  for (const marker of ['S100B', 'NDKA']) await analyst.getByLabel(marker, { exact: true }).check()
  await analyst.getByLabel('As they are').check()
  await analyst.getByLabel('Title').fill('Panel of S100B and NDKA')
  await analyst.getByRole('button', { name: 'Compute and store' }).click()
  await expect(analyst.getByRole('heading', { name: /[Cc]orrected/ }).first()).toBeVisible({
    timeout: 60_000,
  })
  await expect(analyst.getByText(/5\.33/).first()).toBeVisible()
  await issueReport(analyst, studyId)

  const closed = await openPart(monitor, studyId, 'closed')
  expect(closed).toMatch(/0\.164/)
  expect(closed).toMatch(/0\.731\s*\(0\.630 to 0\.833\)/)
  expect(closed).toMatch(/research use only/i)
  const open = await openPart(lead, studyId, 'open')
  expect(open).not.toMatch(/0\.731/)
  expect(open).toMatch(/113/)
  // The study lead is no reader of the closed part.
  await expect(lead.locator('a[href$="/closed.pdf"]')).toHaveCount(0)
})

test('the survey of exhaled nitric oxide goes in whole and gives its area against current asthma', async ({
  pageOf,
}) => {
  const path = lent('real/exhaled-no-survey.csv')
  test.skip(
    !hasReference('real/exhaled-no-survey.csv'),
    'The survey is not shipped with the project and does not lie beside it.',
  )
  test.setTimeout(8 * 60_000)
  const { lead, monitor, analyst } = await people(pageOf)
  const studyId = await setUpStudy(lead, {
    title: 'Exhaled nitric oxide in a health survey',
    condition: 'Current asthma, as told by the person',
    analytes: [{ name: 'Nitric oxide', unit: 'ppb', catalogue: true }],
    biomarkers: [{ analyte: 'Nitric oxide', cutOff: '22' }],
    sites: [{ name: 'Survey', prefix: 'S01' }],
  })
  await addTheOthers(lead, studyId)
  await bringIn(lead, studyId, {
    path,
    meanings: {
      subject: 'Subject',
      exhaled_no_ppb: 'Sensor value',
      current_asthma: 'Reference outcome',
      ever_asthma: 'Left out',
      steroid_2_days: 'Left out',
      cotinine_ng_ml: 'Left out',
      fev1_ml: 'Left out',
      fvc_ml: 'Left out',
    },
    analytes: { exhaled_no_ppb: 'Nitric oxide' },
    outcome: { column: 'current_asthma', present: '1', absent: '0' },
    siteOfAllRows: 'Survey',
    rows: /^Enter 17,978 rows$/,
  })
  await lockData(lead, monitor, studyId)

  await analyst.goto(`/studies/${studyId}/results/explore?kind=accuracy`)
  // R 4.2.2 with pROC: 0.58276, DeLong 0.56651 to 0.59901; 1,579 present, 15,173 absent.
  await expect(
    analyst.getByRole('heading', { name: /0\.583\s*\(0\.567 to 0\.599\)/ }),
  ).toBeVisible()
  await expect(analyst.getByText(/Present \(1,579\)/).first()).toBeVisible()
  await expect(analyst.getByText(/Absent \(15,173\)/).first()).toBeVisible()
  await storeAnalysis(analyst)
  await issueReport(analyst, studyId)
  const closed = await openPart(analyst, studyId, 'closed')
  expect(closed).toMatch(/0\.583\s*\(0\.567 to 0\.599\)/)
})

test('a breath-ammonia series of two sites gives its area', async ({ pageOf }) => {
  const { lead, monitor, analyst } = await people(pageOf)
  const studyId = await setUpStudy(lead, {
    title: 'Synthetic breath ammonia (invented)',
    condition: 'Invented condition',
    analytes: [
      { name: 'Ammonia', unit: 'ppb', catalogue: true },
      { name: 'Isoprene', unit: 'ppb', catalogue: true },
    ],
    biomarkers: [{ analyte: 'Ammonia' }, { analyte: 'Isoprene' }],
    sites: [
      { name: 'Site A', prefix: 'A01' },
      { name: 'Site B', prefix: 'B01' },
    ],
  })
  await addTheOthers(lead, studyId)
  await bringIn(lead, studyId, {
    path: own('breath-ammonia.csv'),
    meanings: {
      id: 'Subject',
      label: 'Reference outcome',
      ammonia_ppb: 'Sensor value',
      isoprene_ppb: 'Sensor value',
      site: 'Site',
      sex: 'Sex',
    },
    analytes: { ammonia_ppb: 'Ammonia', isoprene_ppb: 'Isoprene' },
    outcome: { column: 'label', present: '1', absent: '0' },
    sites: { A: 'Site A', B: 'Site B' },
    rows: /^Enter 240 rows$/,
  })
  await lockData(lead, monitor, studyId)
  await analyst.goto(`/studies/${studyId}/results/explore?kind=accuracy`)
  // R 4.2.2 with pROC on this synthetic file: area 0.68470, DeLong 0.61351 to 0.75589.
  await expect(
    analyst.getByRole('heading', { name: /0\.685\s*\(0\.614 to 0\.756\)/ }),
  ).toBeVisible()
})

test('peak flow by two meters gives the limits of agreement that Bland and Altman printed', async ({
  pageOf,
}) => {
  const { lead, monitor, analyst } = await people(pageOf)
  const studyId = await setUpStudy(lead, {
    title: 'Peak expiratory flow by two meters (published table)',
    condition: 'None; agreement alone',
    analytes: [{ name: 'Peak expiratory flow', unit: 'L/min' }],
    biomarkers: [{ analyte: 'Peak expiratory flow' }],
    limits: { analyte: 'Peak expiratory flow', lower: '-40', upper: '40' },
    sites: [{ name: 'One laboratory', prefix: 'L01' }],
  })
  await addTheOthers(lead, studyId)
  await bringIn(lead, studyId, {
    path: own('pefr.csv'),
    meanings: {
      subject: 'Subject',
      wright_1: 'Sensor value',
      wright_2: 'Left out',
      mini_1: 'Reference analyser value',
      mini_2: 'Left out',
    },
    analytes: { wright_1: 'Peak expiratory flow', mini_1: 'Peak expiratory flow' },
    siteOfAllRows: 'One laboratory',
    rows: /^Enter 17 rows$/,
  })
  await lockData(lead, monitor, studyId)
  await analyst.goto(`/studies/${studyId}/results/explore?kind=agreement`)
  // Bland and Altman 1986: mean difference −2.1 L/min, standard deviation 38.8 L/min.
  await expect(analyst.getByRole('heading', { name: /Bias −2\.1/ })).toBeVisible()
  await storeAnalysis(analyst)
  await issueReport(analyst, studyId)
  const closed = await openPart(monitor, studyId, 'closed')
  expect(closed).toMatch(/Bias −2\.1/)
  expect(closed).toMatch(/38\.8/)
})
