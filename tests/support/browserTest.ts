import { type BrowserContext, test as base, expect, type Page } from '@playwright/test'
import { type StackUnderTest, stackUnderTest } from './stack.ts'

type Journey = {
  stack: StackUnderTest
  /** A page of a browser of its own in which the account is signed in. */
  pageOf: (account: string) => Promise<Page>
  /** Says that the API will refuse: only then may the browser's console report that status. */
  expectRefusal: (status: number) => void
}

/**
 * Playwright's test with the product started, people who can sign in, and one rule more: anything
 * that the console calls an error, and any error nobody caught, fails the test.
 */
export const test = base.extend<Journey & { complaints: Complaints }>({
  // biome-ignore lint/correctness/noEmptyPattern: Playwright reads the fixture's needs from the pattern.
  stack: async ({}, use) => use(stackUnderTest()),
  baseURL: async ({ stack }, use) => use(stack.publicUrl),
  complaints: [
    // biome-ignore lint/correctness/noEmptyPattern: as above
    async ({}, use) => {
      const complaints = new Complaints()
      await use(complaints)
      expect(complaints.heard, 'the console stays without errors').toEqual([])
    },
    { auto: true },
  ],
  expectRefusal: async ({ complaints }, use) => use((status) => complaints.allow(status)),
  context: async ({ context, complaints }, use) => {
    complaints.listen(context)
    await use(context)
  },
  pageOf: async ({ browser, baseURL, complaints, contextOptions }, use) => {
    const contexts: BrowserContext[] = []
    await use(async (account) => {
      const context = await browser.newContext({ ...contextOptions, baseURL })
      contexts.push(context)
      complaints.listen(context)
      const page = await context.newPage()
      await signIn(page, account)
      return page
    })
    for (const context of contexts) await context.close()
  },
})

export { expect }

/** Signs in at the stand-in provider and comes back to the first page, or to the one named. */
export async function signIn(page: Page, account: string, returnTo = '/'): Promise<void> {
  await page.goto(`/auth/login?returnTo=${encodeURIComponent(returnTo)}`)
  await page.locator(`button[value="${account}"]`).click()
  await page.waitForURL((url) => url.pathname === returnTo.split('?')[0])
}

class Complaints {
  readonly heard: string[] = []
  private readonly allowed = new Set<number>()

  allow(status: number): void {
    this.allowed.add(status)
  }

  listen(context: BrowserContext): void {
    context.on('console', (message) => {
      if (message.type() === 'error' && !this.isExpected(message.text(), message.location().url))
        this.heard.push(`${message.text()} (${message.location().url})`)
    })
    context.on('weberror', (webError) => {
      this.heard.push(String(webError.error().stack ?? webError.error()))
    })
  }

  /** Asking who one is, with nobody signed in, is how the client finds that out. */
  private isExpected(text: string, url: string): boolean {
    const status = Number(/the server responded with a status of (\d{3})/.exec(text)?.[1])
    return this.allowed.has(status) || (status === 401 && new URL(url).pathname === '/api/me')
  }
}
