import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { expect, test } from '../support/browserTest.ts'

/** Pages of the locked demonstration study, and who goes there. */
const STUDY_PAGES: [account: string, path: string][] = [
  ['study-lead', 'protocol'],
  ['study-lead', 'team'],
  ['study-lead', 'subjects'],
  ['study-lead', 'imports'],
  ['study-lead', 'sessions'],
  ['study-lead', 'reference'],
  ['monitor-oversight', 'review'],
  ['monitor-oversight', 'lock'],
  ['analyst-centre', 'results'],
  ['analyst-centre', 'results/explore?kind=accuracy'],
  ['analyst-centre', 'results/explore?kind=agreement'],
  ['analyst-centre', 'reports'],
  ['analyst-centre', 'reports/new'],
  ['north-bedside', 'results'],
]
const PLAIN_PAGES: [account: string, path: string][] = [
  ['study-lead', '/'],
  ['study-lead', '/studies/new'],
  ['outsider', '/'],
  ['analyst-centre', '/planning'],
  ['analyst-centre', '/sensor'],
]
const WIDTHS = [1440, 820, 390, 320]
const STANDARD = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

async function demonstration(page: Page): Promise<string> {
  const studies: { id: string; code: string }[] = await (
    await page.request.get('/api/studies')
  ).json()
  return studies.find((study) => study.code === 'LARK-1')!.id
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
    [390, 'day'],
    [1440, 'night'],
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

const accounts = [...new Set([...STUDY_PAGES, ...PLAIN_PAGES].map(([account]) => account))]
for (const account of accounts)
  test(`every page that ${account} opens fits each width and has no flaw that axe finds`, async ({
    pageOf,
  }) => {
    const page = await pageOf(account)
    const own = STUDY_PAGES.filter(([who]) => who === account)
    const study = own.length > 0 ? await demonstration(page) : ''
    const addresses = [
      ...own.map(([, path]) => `/studies/${study}/${path}`),
      ...PLAIN_PAGES.filter(([who]) => who === account).map(([, path]) => path),
    ]
    for (const address of addresses) {
      await page.goto(address)
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
      await page.waitForLoadState('networkidle')
      expect([address, await flaws(page)]).toEqual([address, []])
    }
  })
