import { execFileSync } from 'node:child_process'
import { readdirSync, readFileSync } from 'node:fs'
import { expect, test } from 'vitest'

const root = new URL('../../', import.meta.url).pathname

test('the generated pages of docs/reference say what the code says', () => {
  expect(() =>
    execFileSync(process.execPath, ['--import', 'tsx', 'docs/reference/write.ts', '--check'], {
      cwd: root,
      stdio: 'pipe',
    }),
  ).not.toThrow()
})

test('every table is named in the grants, and none may be truncated, dropped or altered by the application', () => {
  const grants = readFileSync(`${root}db/grants.sql`, 'utf8')
  const tables = readdirSync(`${root}db/schema`)
    .map(
      (file) =>
        /mysqlTable\(\s*'(\w+)'/.exec(readFileSync(`${root}db/schema/${file}`, 'utf8'))?.[1],
    )
    .filter((name) => name !== undefined)
  expect(tables.length).toBeGreaterThan(25)
  expect(tables.filter((name) => !new RegExp(`\\bON ${name} TO `).test(grants))).toEqual([])
  expect(grants).not.toMatch(/GRANT[^;]*\b(ALL|DROP|ALTER|CREATE|TRIGGER)\b/)
})

test('what is written once may be inserted by the application and nothing more', () => {
  const grants = readFileSync(`${root}db/grants.sql`, 'utf8')
  for (const table of [
    'audit_events',
    'audit_values',
    'signatures',
    'datasets',
    'dataset_rows',
    'analyses',
    'report_files',
  ])
    expect(
      [...grants.matchAll(new RegExp(`GRANT (.*) ON ${table} TO 'breathmark_app'`, 'g'))].map(
        (match) => match[1],
      ),
    ).toEqual(['INSERT'])
})
