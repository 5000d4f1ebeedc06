import { spawnSync } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, test } from 'vitest'

const root = join(import.meta.dirname, '../..')
const bootstrap = join(root, 'server/local/bootstrap.mjs')

test('an unknown command gets one sentence with the known ones', () => {
  const { status, stdout, stderr } = spawnSync(process.execPath, [bootstrap, 'launch'])
  expect(status).toBe(1)
  expect(String(stdout)).toBe('')
  expect(String(stderr)).toBe('Say one of: start, test, production.\n')
})

test("the first program imports nothing but Node's own modules", () => {
  const source = readFileSync(bootstrap, 'utf8')
  const imported = [...source.matchAll(/from '([^']+)'|import\('([^']+)'\)/g)].map(
    ([, from, dynamic]) => from ?? dynamic,
  )
  expect(imported.length).toBeGreaterThan(3)
  expect(imported.filter((name) => !name?.startsWith('node:'))).toEqual([])
})

test('an incomplete environment stops the production start with a line for each variable', () => {
  const env = { PATH: process.env.PATH, BREATHMARK_PUBLIC_URL: 'http://breath.hospital.example' }
  const { status, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', 'server/local/production.ts'],
    { cwd: root, env },
  )
  expect(status).toBe(1)
  expect(String(stderr)).toMatch(/^BREATHMARK_SECRET: /m)
  expect(String(stderr)).toMatch(/^BREATHMARK_OIDC_ISSUER: /m)
  expect(String(stderr)).not.toMatch(/\n {4}at /)
})
