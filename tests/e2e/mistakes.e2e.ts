import type { Page } from '@playwright/test'
import { expect, test } from '../support/browserTest.ts'
import { addToTeam, setUpStudy } from './team.ts'

const STUDY = {
  title: 'Mistakes on the way (invented)',
  condition: 'Invented condition',
  analytes: [{ name: 'Ammonia', unit: 'ppb', catalogue: true as const }],
  biomarkers: [{ analyte: 'Ammonia' }],
  sites: [{ name: 'One ward', prefix: 'W01' }],
}

async function enrol(page: Page, studyId: string): Promise<string> {
  await page.goto(`/studies/${studyId}/subjects/enrol`)
  await page.getByLabel('Female').check()
  await page.getByLabel('Age band').selectOption({ label: '50–54' })
  await page.getByRole('button', { name: 'Enrol the subject' }).click()
  await expect(page.getByText('Write this code into your site file now')).toBeVisible()
  return page.url()
}

async function correct(page: Page, address: string): Promise<void> {
  await page.goto(address)
  await page.getByRole('button', { name: 'Correct', exact: true }).click()
  await page
    .getByLabel('Reason for the change: kind')
    .selectOption({ label: 'The source record was corrected' })
}

/** The value beside a term, as in "Corrected: twice". */
const factOf = (page: Page, term: string) =>
  page.locator('dt', { hasText: term }).locator('xpath=following-sibling::dd[1]').first()

test('bad input on the study form keeps what was typed and leads to the field', async ({
  pageOf,
}) => {
  const page = await pageOf('study-lead')
  await page.goto('/studies/new')
  // Blank fields are nothing to lose.
  await expect(page.getByText('All saved', { exact: true })).toBeVisible()
  await page.getByLabel('Title').fill('Ammonia in breath')
  await page.getByLabel('Short name').fill('not a short name')
  await page.getByLabel('Planned cut-off').fill('1,5')
  await expect(page.getByText('Not saved yet', { exact: true })).toBeVisible()
  await page.getByRole('button', { name: 'Set up the study' }).click()

  const summary = page.getByRole('alert').filter({ hasText: 'Not saved' })
  await expect(summary).toBeFocused()
  const links = summary.getByRole('link')
  // In the order of the page: its first field comes first, a site near its end comes last.
  await expect(links.first()).toHaveText(/^Short name: Three to 20 capital letters/)
  await expect(links.last()).toHaveText(/^Site 1, Prefix of its subject codes: /)
  await links
    .filter({ hasText: 'Biomarker 1, Planned cut-off: Write "1,5" without a comma' })
    .click()
  await expect(page.getByLabel('Planned cut-off')).toBeFocused()
  await expect(page.getByLabel('Planned cut-off')).toHaveValue('1,5')
  await expect(page.getByLabel('Title')).toHaveValue('Ammonia in breath')

  // Nor does signing out drop it unasked.
  await page.getByRole('button', { name: 'Sign out' }).click()
  const question = page.getByRole('dialog', { name: 'Leave without saving?' })
  await question.getByRole('button', { name: 'Stay on this page' }).click()
  await expect(page.getByLabel('Title')).toHaveValue('Ammonia in breath')
  expect((await page.request.get('/api/me')).status()).toBe(200)
})

test('a file with wrong rows names line, column and reason, and nothing of it is stored', async ({
  pageOf,
}) => {
  const page = await pageOf('study-lead')
  const studyId = await setUpStudy(page, STUDY)
  await page.goto(`/studies/${studyId}/imports/new`)
  await page.locator('input[type=file]').setInputFiles({
    name: 'rows.csv',
    mimeType: 'text/csv',
    buffer: Buffer.from('id;nh3;age\nA1;12,5;54\nA2;abc;61\nA3;7,1;200\n'),
  })
  await page.getByRole('button', { name: 'Upload and read the headings' }).click()
  await page.getByLabel('with a comma: 0,5').check()
  for (const [column, meaning] of [
    ['id', 'Subject'],
    ['nh3', 'Sensor value'],
    ['age', 'Age in years'],
  ] as const)
    await page.getByLabel(`Meaning of ${column}`, { exact: true }).selectOption({ label: meaning })
  await page.getByLabel('Analyte of nh3').selectOption({ label: 'Ammonia, ppb' })
  await page.getByRole('button', { name: 'Check all rows' }).click()
  await expect(page.getByText('rows are refused and stay out')).toBeVisible()
  await page.getByText('Refused 2', { exact: true }).click()
  await expect(page.getByRole('row', { name: /^3 nh3 abc Not a number/ })).toBeVisible()
  await expect(page.getByRole('row', { name: /^4 age 200 Not an age/ })).toBeVisible()

  await page
    .getByRole('link', { name: /^Subjects/ })
    .first()
    .click()
  await expect(page.getByText('No subjects yet')).toBeVisible()
})

test('a login that ends while somebody types loses nothing', async ({ pageOf, expectRefusal }) => {
  expectRefusal(401)
  const page = await pageOf('study-lead')
  const studyId = await setUpStudy(page, STUDY)
  await page.goto(`/studies/${studyId}/subjects/enrol`)
  await page.getByLabel('Female').check()
  await page.getByLabel('Age band').selectOption({ label: '50–54' })
  await page.context().clearCookies()
  await page.getByRole('button', { name: 'Enrol the subject' }).click()

  const dialog = page.getByRole('dialog', { name: 'Please sign in again' })
  const [second] = await Promise.all([
    page.context().waitForEvent('page'),
    dialog.getByRole('link', { name: /^Sign in again/ }).click(),
  ])
  await second.locator('button[value="study-lead"]').click()
  await second.getByRole('button', { name: 'Close this window' }).click()
  await dialog.getByRole('button', { name: 'I have signed in' }).click()
  await expect(dialog).toBeHidden()
  await expect(page.getByText('Your login had ended.')).toBeVisible()
  await expect(page.getByLabel('Female')).toBeChecked()
  await page.getByRole('button', { name: 'Enrol the subject' }).click()
  await expect(page.getByText('Write this code into your site file now')).toBeVisible()
})

test('a page that one person opened is closed to whoever signs in after them, and keeps what was typed', async ({
  pageOf,
}) => {
  const page = await pageOf('study-lead')
  await page.goto('/studies/new')
  await page.getByLabel('Title').fill('Begun by the study lead')
  const { context, login } = { context: page.context(), login: await page.context().cookies() }
  await context.clearCookies()
  const second = await context.newPage()
  await second.goto('/auth/login')
  await second.locator('button[value="analyst-centre"]').click()
  await second.waitForURL((url) => url.pathname === '/')
  await second.close()
  await page.evaluate(() => window.dispatchEvent(new Event('focus')))
  const dialog = page.getByRole('dialog', { name: 'Somebody else is signed in now' })
  await expect(
    dialog.getByText(/Coordinator, study lead opened this page, and Analyst, coordinating centre/),
  ).toBeVisible()

  await context.clearCookies()
  await context.addCookies(login)
  await dialog.getByRole('button', { name: /has signed in again$/ }).click()
  await expect(dialog).toBeHidden()
  await expect(page.getByLabel('Title')).toHaveValue('Begun by the study lead')
})

test('two people who correct one subject see both versions, and neither undoes the other unseen', async ({
  pageOf,
  expectRefusal,
}) => {
  expectRefusal(409)
  const [first, second] = [await pageOf('study-lead'), await pageOf('study-lead')]
  const studyId = await setUpStudy(first, STUDY)
  const address = await enrol(first, studyId)
  await correct(first, address)
  await correct(second, address)

  await first.getByLabel('Male', { exact: true }).check()
  await first.getByRole('button', { name: 'Save the correction' }).click()
  await expect(factOf(first, 'Corrected')).toHaveText('once')
  await expect(first.getByRole('button', { name: 'Correct', exact: true })).toBeFocused()

  await second.getByLabel('Age band').selectOption({ label: '30–34' })
  await second.getByRole('button', { name: 'Save the correction' }).click()
  const versions = second.getByRole('table', { name: 'Your version and the stored one' })
  await expect(versions.getByRole('row', { name: 'Sex Male Male' })).toBeVisible()
  await expect(versions.getByRole('row', { name: 'Age band 30–34 50–54' })).toBeVisible()
  await second.getByRole('button', { name: 'Put mine in its place' }).dblclick()
  await expect(factOf(second, 'Corrected')).toHaveText('twice')
  await expect(factOf(second, 'Sex')).toHaveText('Male')
  await expect(factOf(second, 'Age band')).toHaveText(/30–34/)
})

test('a coordinator is refused the closed part of a report, on the page and at its address', async ({
  pageOf,
}) => {
  const monitor = await pageOf('monitor-oversight')
  const studies: { id: string; code: string }[] = await (
    await monitor.request.get('/api/studies')
  ).json()
  const studyId = studies.find((study) => study.code === 'LARK-1')!.id
  await monitor.goto(`/studies/${studyId}/reports`)
  const closed = monitor.locator('a[href$="/closed.pdf"]').first()
  await expect(closed).toBeVisible()
  const address = (await closed.getAttribute('href'))!

  const lead = await pageOf('study-lead')
  await lead.goto(`/studies/${studyId}/reports`)
  await expect(lead.locator('a[href$="/open.pdf"]').first()).toBeVisible()
  await expect(lead.locator('a[href$="/closed.pdf"]')).toHaveCount(0)
  const refused = await lead.request.get(address)
  expect(refused.status()).toBe(403)
  expect(await refused.json()).toMatchObject({ code: 'not-allowed' })

  // The attempt stands in the trail, in words.
  await monitor.goto(`/studies/${studyId}/review`)
  await expect(
    monitor
      .getByRole('row', { name: /Attempt refused/ })
      .filter({ hasText: 'would have been “Closed part of a report opened”' })
      .first(),
  ).toBeVisible()
})

test('an address that asks for what a table does not have leads back to all rows', async ({
  pageOf,
  expectRefusal,
}) => {
  expectRefusal(422)
  const page = await pageOf('study-lead')
  const studyId = await setUpStudy(page, STUDY)
  await enrol(page, studyId)
  await page.goto(`/studies/${studyId}/subjects?sort=nothing&after=nowhere`)
  await page.getByRole('button', { name: 'Show all rows' }).click()
  await expect(page.getByRole('row', { name: /^W01-/ })).toBeVisible()
})

test('a lock that was withdrawn meanwhile is not sent back in silence', async ({
  pageOf,
  expectRefusal,
}) => {
  expectRefusal(409)
  const [lead, monitor] = [await pageOf('study-lead'), await pageOf('monitor-oversight')]
  const studyId = await setUpStudy(lead, STUDY)
  await addToTeam(lead, studyId, [['Monitor, oversight', 'Monitor']])
  await lead.goto(`/studies/${studyId}/lock`)
  await lead.getByRole('button', { name: 'Ask for the final lock' }).click()
  await lead.getByRole('button', { name: 'Ask for the lock' }).click()
  await lead.getByRole('button', { name: 'Withdraw the request' }).click()

  await monitor.goto(`/studies/${studyId}/lock`)
  await monitor.getByRole('button', { name: 'Send back with a reason' }).click()
  const decision = monitor.getByRole('dialog', { name: 'Send the request back' })
  await decision.getByLabel('Reason: kind').selectOption({ label: 'Data are missing' })

  const withdrawal = lead.getByRole('dialog', { name: 'Withdraw the request' })
  await withdrawal.getByLabel('Reason: kind').selectOption({ index: 1 })
  await withdrawal.getByRole('button', { name: 'Withdraw the request' }).click()
  await expect(withdrawal).toBeHidden()

  await decision.getByRole('button', { name: 'Send it back' }).click()
  await expect(decision.getByRole('alert')).toContainText('no longer open: withdrawn')
  await expect(decision.getByLabel('Reason: kind')).toHaveValue('Data are missing')
})
