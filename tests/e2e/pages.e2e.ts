import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { expect, test } from '../support/browserTest.ts'

type Visit = { account: string; path: string; study?: string }

/** Pages of the locked demonstration studies and outside of any study, and who goes there. */
const inStudy = (account: string, ...paths: string[]): Visit[] =>
  paths.map((path) => ({ account, path, study: 'LARK-1' }))
const VISITS: Visit[] = [
  ...inStudy('study-lead', 'protocol', 'team', 'subjects', 'imports', 'sessions', 'reference'),
  ...inStudy('monitor-oversight', 'review', 'lock'),
  ...inStudy('analyst-centre', 'results', 'results/explore?kind=accuracy'),
  ...inStudy('analyst-centre', 'results/explore?kind=agreement', 'results/compare'),
  ...inStudy('analyst-centre', 'results/panel', 'reports', 'reports/new'),
  ...inStudy('north-bedside', 'results'),
  { account: 'analyst-centre', path: 'results/explore?kind=precision', study: 'WREN-1' },
  { account: 'study-lead', path: '/' },
  { account: 'study-lead', path: '/studies/new' },
  { account: 'outsider', path: '/' },
  { account: 'analyst-centre', path: '/planning' },
  { account: 'analyst-centre', path: '/sensor' },
  { account: 'analyst-centre', path: '/sensor/trace' },
]
const WIDTHS = [1440, 820, 390, 320]
const STANDARD = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

async function keyOf(page: Page, code: string): Promise<string> {
  const studies: { id: string; code: string }[] = await (
    await page.request.get('/api/studies')
  ).json()
  return studies.find((study) => study.code === code)!.id
}

/** What is wrong with the page as it stands: sideways overflow at some width, and axe by day and by night. */
async function flaws(page: Page): Promise<string[]> {
  const found: string[] = []
  for (const width of WIDTHS) {
    await page.setViewportSize({ width, height: 900 })
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
    if (over > 0) found.push(`${width} px: ${over} px too wide`)
  }
  for (const [width, theme] of [
    [1440, 'day'],
    [390, 'night'],
  ] as const) {
    await page.setViewportSize({ width, height: 900 })
    if (theme === 'night') await page.getByRole('button', { name: /^Night/ }).click()
    const { violations } = await new AxeBuilder({ page }).withTags(STANDARD).analyze()
    for (const { id, nodes } of violations)
      found.push(
        `${width} px, ${theme}: ${id} at ${nodes
          .map((node) => node.target.join(' '))
          .slice(0, 3)
          .join('; ')}`,
      )
    if (theme === 'night') await page.getByRole('button', { name: /^Day/ }).click()
  }
  return found
}

for (const { account, path, study } of VISITS)
  test(`${study ?? ''} ${path} fits each width and has no flaw that axe finds (${account})`, async ({
    pageOf,
  }) => {
    const page = await pageOf(account)
    await page.goto(study ? `/studies/${await keyOf(page, study)}/${path}` : path)
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
    await page.waitForLoadState('networkidle')
    expect(await flaws(page)).toEqual([])
  })
