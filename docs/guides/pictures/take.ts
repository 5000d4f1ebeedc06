import { join } from 'node:path'
import { chromium, type Page } from 'playwright-core'

/**
 * Takes the pictures of README and guides from a running `npm start` with its demonstration data,
 * so that they show what is there: `npm run docs:pictures`.
 */
const product = process.env.BREATHMARK_PUBLIC_URL ?? 'http://127.0.0.1:4173'
const CHROMIUM = '/usr/bin/chromium'
const WIDE = { width: 1440, height: 900 }
const TABLET = { width: 820, height: 1180 }

const PICTURES = [
  { name: 'subjects', account: 'study-lead', path: 'subjects', viewport: WIDE },
  { name: 'lock', account: 'monitor-oversight', path: 'lock', viewport: WIDE },
  {
    name: 'results',
    account: 'analyst-centre',
    path: 'results/explore?kind=accuracy',
    viewport: { ...WIDE, height: 1200 },
  },
  {
    name: 'agreement',
    account: 'analyst-centre',
    path: 'results/explore?kind=agreement',
    viewport: { ...WIDE, height: 1200 },
  },
  { name: 'review', account: 'monitor-oversight', path: 'review', viewport: WIDE },
  { name: 'reports-tablet', account: 'analyst-centre', path: 'reports', viewport: TABLET },
  {
    name: 'results-night-tablet',
    account: 'analyst-centre',
    path: 'results/explore?kind=accuracy',
    viewport: TABLET,
    night: true,
  },
]

const browser = await chromium.launch({
  executablePath: CHROMIUM,
  args: [
    '--no-sandbox',
    '--disable-gpu',
    '--disable-quic',
    '--no-first-run',
    '--disable-background-networking',
  ],
})
for (const picture of PICTURES) {
  const context = await browser.newContext({ viewport: picture.viewport, locale: 'en-GB' })
  const page = await context.newPage()
  const studyId = await signIn(page, picture.account)
  await page.goto(`${product}/studies/${studyId}/${picture.path}`)
  if (picture.night) await page.getByRole('button', { name: /Night/ }).click()
  await page.waitForLoadState('networkidle')
  await page.evaluate(() => document.fonts.ready)
  await page.screenshot({ path: join(import.meta.dirname, `${picture.name}.png`) })
  await context.close()
}
await browser.close()

/** @returns the key of the locked demonstration study */
async function signIn(page: Page, account: string): Promise<string> {
  await page.goto(`${product}/auth/login`)
  await page.locator(`button[value="${account}"]`).click()
  await page.waitForURL(`${product}/**`)
  const studies: { id: string; code: string }[] = await (
    await page.request.get(`${product}/api/studies`)
  ).json()
  return studies.find((study) => study.code === 'LARK-1')!.id
}
