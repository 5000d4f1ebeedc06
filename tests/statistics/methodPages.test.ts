import { readdirSync, readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { expect, test } from 'vitest'

const root = join(dirname(fileURLToPath(import.meta.url)), '../..')
const statistics = join(root, 'shared/statistics')
const pages = join(root, 'docs/methods')
const FAMILIES = ['accuracy', 'cutOffs', 'agreement', 'sensor', 'panel', 'planning', 'proportions']

const text = readdirSync(pages)
  .filter((page) => page.endsWith('.md'))
  .map((page) => readFileSync(join(pages, page), 'utf8'))
  .join('\n')

test('every statistic is named on a page of methods', () => {
  const missing = FAMILIES.flatMap((family) => readdirSync(join(statistics, family)))
    // tables of names in capitals are no statistics
    .filter((file) => !file.includes('_METHODS'))
    .map((file) => file.replace('.ts', ''))
    .filter((name) => !text.includes(`\`${name}\``))
  expect(missing).toEqual([])
})

test('every file of statistics exports one function of its own name at most', () => {
  const wrong = readdirSync(statistics, { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts') && !file.endsWith('.d.ts'))
    .filter((file) => {
      const source = readFileSync(join(statistics, file), 'utf8')
      const name = file.split('/').at(-1)!.replace('.ts', '')
      const exported = [...source.matchAll(/^export (?:async )?function (\w+)/gm)].map((m) => m[1])
      return exported.length > 1 || exported.some((one) => one !== name)
    })
  expect(wrong).toEqual([])
})

test('the statistics import nothing but each other and jStat', () => {
  const foreign = readdirSync(statistics, { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.ts'))
    .flatMap((file) =>
      [...readFileSync(join(statistics, file), 'utf8').matchAll(/from '([^']+)'/g)]
        .map((match) => match[1]!)
        .filter((from) => from !== 'jstat' && !from.startsWith('./') && !from.startsWith('../'))
        .map((from) => `${file}: ${from}`),
    )
  expect(foreign).toEqual([])
})
