import { randomUUID } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { expect, type Locator, type Page } from '@playwright/test'

/** What the journeys do on the screens, in the words that stand on them. */

export type StudyPlan = {
  title: string
  condition: string
  analytes: { name: string; unit: string; catalogue?: true }[]
  biomarkers: { analyte: string; cutOff?: string }[]
  limits?: { analyte: string; lower: string; upper: string }
  sites: { name: string; prefix: string }[]
}

/** Sets a study of earlier data up on its one page. @returns its key */
export async function setUpStudy(page: Page, plan: StudyPlan): Promise<string> {
  await page.goto('/')
  await page.getByRole('link', { name: 'Set up a study' }).click()
  await page.getByLabel('Short name').fill(`E2E-${randomUUID().slice(0, 8).toUpperCase()}`)
  await page.getByLabel('Title').fill(plan.title)
  await page.getByLabel('As they came (cohort)').check()
  await page.getByLabel('Target condition').fill(plan.condition)
  await page.getByLabel('Reference standard').fill('As the file states it')
  for (const analyte of plan.analytes) {
    await page.getByLabel('Add an analyte').fill(analyte.name)
    const pick = analyte.catalogue
      ? page.getByRole('list', { name: 'Catalogue of breath gases' }).getByRole('button').first()
      : page.getByRole('button', { name: `Add “${analyte.name}”` })
    await pick.click()
    await page
      .getByRole('group', { name: analyte.name, exact: true })
      .getByLabel('Unit of its values')
      .selectOption({ label: analyte.unit })
  }
  for (const [index, biomarker] of plan.biomarkers.entries()) {
    if (index > 0) await page.getByRole('button', { name: 'Add another biomarker' }).click()
    const entry = page.getByRole('group', { name: `Biomarker ${index + 1}` })
    await chooseStarting(entry.getByLabel('Analyte'), biomarker.analyte)
    if (biomarker.cutOff) await entry.getByLabel('Planned cut-off').fill(biomarker.cutOff)
    await entry.getByLabel('Higher values point to the condition').check()
  }
  if (plan.biomarkers.length > 1)
    await chooseStarting(page.getByLabel('Primary biomarker'), plan.biomarkers[0]!.analyte)
  if (plan.limits) {
    await page.getByRole('button', { name: 'Set limits for an analyte' }).click()
    const entry = page.getByRole('group', { name: 'Limits 1' })
    await chooseStarting(entry.getByLabel('Analyte'), plan.limits.analyte)
    await entry.getByLabel('Lowest difference').fill(plan.limits.lower)
    await entry.getByLabel('Highest difference').fill(plan.limits.upper)
  }
  for (const [index, site] of plan.sites.entries()) {
    if (index > 0) await page.getByRole('button', { name: 'Add another site' }).click()
    const entry = page.getByRole('group', { name: `Site ${index + 1}` })
    await entry.getByLabel('Site', { exact: true }).fill(site.name)
    await entry.getByLabel('Prefix of its subject codes').fill(site.prefix)
  }
  await page.getByRole('button', { name: 'Set up the study' }).click()
  await page.waitForURL(/\/studies\/[0-9a-f-]{36}/)
  return /studies\/([0-9a-f-]{36})/.exec(page.url())![1]!
}

/** Adds people to the team, with the role that the hospital vouches for. */
export async function addToTeam(
  page: Page,
  studyId: string,
  names: [name: string, role: string][],
): Promise<void> {
  await page.goto(`/studies/${studyId}/team`)
  for (const [name, role] of names) {
    await page.getByRole('button', { name: 'Add somebody' }).click()
    const dialog = page.getByRole('dialog', { name: 'Add somebody to the team' })
    await dialog.getByLabel('Person').selectOption({ label: name })
    await dialog.getByRole('radio', { name: new RegExp(`^${role}`) }).check()
    await dialog.getByRole('button', { name: 'Add to the team' }).click()
    await expect(dialog).toBeHidden()
  }
}

export type FilePlan = {
  path: string
  /** Meaning of each heading, as it stands in the list; what is not named keeps its suggestion. */
  meanings: Record<string, string>
  analytes?: Record<string, string>
  /** Words of the outcome column for present and absent. */
  outcome?: { column: string; present: string; absent: string }
  siteOfAllRows?: string
  sites?: Record<string, string>
  rows: RegExp
}

/** Brings a file in: names its columns, looks at the rows, enters them. */
export async function bringIn(page: Page, studyId: string, file: FilePlan): Promise<void> {
  await page.goto(`/studies/${studyId}/imports/new`)
  await page.locator('input[type=file]').setInputFiles({
    name: 'earlier-data.csv',
    mimeType: 'text/csv',
    buffer: readFileSync(file.path),
  })
  await page.getByRole('button', { name: 'Upload and read the headings' }).click()
  await expect(page.getByRole('heading', { name: 'What the columns mean' })).toBeVisible()
  await page.getByLabel('with a point: 0.5').check()
  for (const [column, meaning] of Object.entries(file.meanings))
    await page.getByLabel(`Meaning of ${column}`, { exact: true }).selectOption({ label: meaning })
  for (const [column, analyte] of Object.entries(file.analytes ?? {}))
    await chooseStarting(page.getByLabel(`Analyte of ${column}`, { exact: true }), analyte)
  if (file.outcome) {
    const { column, present, absent } = file.outcome
    await page
      .getByLabel(`What “${present}” in ${column} stands for`)
      .selectOption({ label: 'Present' })
    await page
      .getByLabel(`What “${absent}” in ${column} stands for`)
      .selectOption({ label: 'Absent' })
  }
  if (file.siteOfAllRows)
    await page.getByLabel('Site of all rows').selectOption({ label: file.siteOfAllRows })
  for (const [word, site] of Object.entries(file.sites ?? {}))
    await page.getByLabel(`Site of “${word}”`).selectOption({ label: site })
  await page.getByRole('button', { name: 'Check all rows' }).click()
  const enter = page.getByRole('button', { name: file.rows })
  await expect(enter).toBeVisible({ timeout: 90_000 })
  await page
    .getByLabel('Reason: kind')
    .selectOption({ label: 'The earlier data of this study are brought in' })
  await enter.click()
  await expect(page.getByRole('link', { name: 'See the subjects' })).toBeVisible({
    timeout: 150_000,
  })
}

/** One person asks for the lock, another signs it with a fresh sign-in. */
export async function lockData(lead: Page, monitor: Page, studyId: string): Promise<void> {
  await lead.goto(`/studies/${studyId}/lock`)
  await lead.getByRole('button', { name: 'Ask for the final lock' }).click()
  await lead.getByRole('button', { name: 'Ask for the lock' }).click()
  await expect(lead.getByRole('heading', { name: /Final lock, asked for/ })).toBeVisible()

  await monitor.goto(`/studies/${studyId}/lock`)
  await monitor.getByRole('button', { name: 'Approve and sign' }).click()
  // The provider asks again who it is.
  await monitor.locator('button[value="monitor-oversight"]').click()
  const dialog = monitor.getByRole('dialog', { name: 'Sign the final lock' })
  await expect(dialog.getByText('Monitor, oversight')).toBeVisible()
  await dialog.getByLabel('Why it can be locked: kind').selectOption({ index: 1 })
  await dialog.getByRole('button', { name: 'Sign and lock' }).click()
  await expect(monitor.getByRole('heading', { name: /Final lock, signed on/ })).toBeVisible({
    timeout: 90_000,
  })
}

/** Stores what stands on the explorer, under its suggested title. */
export async function storeAnalysis(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Store this analysis' }).click()
  await page
    .getByRole('dialog', { name: 'Store this analysis' })
    .getByRole('button', { name: 'Store it' })
    .click()
  await page.waitForURL(/\/results\/[0-9a-f-]{36}/)
  // Long computations run beside the request: the page shows their progress, then the result.
  await expect(page.getByRole('button', { name: 'Run it again' })).toBeVisible({ timeout: 90_000 })
}

/** Issues a report of everything stored, and waits until both parts can be opened. */
export async function issueReport(page: Page, studyId: string): Promise<void> {
  await page.goto(`/studies/${studyId}/reports/new`)
  await page.getByLabel('Title').fill('Interim report')
  for (const box of await page.getByRole('checkbox', { name: /^Choose|^Select|\d\. / }).all())
    await box.check()
  await page.getByRole('button', { name: 'Issue the report' }).click()
  await expect(
    page.getByRole('row', { name: /Interim report/ }).getByText('Issued', { exact: true }),
  ).toBeVisible({
    timeout: 90_000,
  })
}

/** Chooses the option that begins so: units may follow the name. */
async function chooseStarting(select: Locator, start: string): Promise<void> {
  const labels = await select.locator('option').allTextContents()
  const label = labels.find((each) => each.startsWith(start))
  await select.selectOption({ label: label ?? start })
}
