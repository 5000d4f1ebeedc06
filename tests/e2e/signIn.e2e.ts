import { expect, signIn, test } from '../support/browserTest.ts'

test('somebody signs in at the provider, is known by name, and signs out at both ends', async ({
  page,
  context,
}) => {
  await signIn(page, 'north-bedside')
  await expect(page.getByRole('banner').getByText('Coordinator, bedside, North ward')).toBeVisible()

  await page.getByRole('button', { name: /sign out/i }).click()
  await page.getByRole('button', { name: 'Sign out' }).click()
  await page.waitForURL((url) => url.pathname === '/')
  const me = await context.request.get('/api/me')
  expect(me.status()).toBe(401)

  // The provider has forgotten the person too: it asks again.
  await page.goto('/auth/login')
  await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible()
})
