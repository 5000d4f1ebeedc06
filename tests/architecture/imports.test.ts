import { readdirSync, readFileSync } from 'node:fs'
import { dirname, join, relative, resolve } from 'node:path'
import { expect, test } from 'vitest'

const root = resolve(import.meta.dirname, '../..')
const HOUSES = ['src', 'server', 'shared', 'db', 'fake-idp'] as const

type Import = { from: string; to: string; typeOnly: boolean }

function filesBelow(folder: string): string[] {
  return readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|tsx|mjs)$/.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)))
}

const files = HOUSES.flatMap(filesBelow)
const text = new Map(files.map((file) => [file, readFileSync(join(root, file), 'utf8')]))

/** Every import of a file of ours, as paths from the root. Packages stay out. */
const imports: Import[] = files.flatMap((from) =>
  [
    ...text
      .get(from)!
      .matchAll(
        /^(?:import|export)\s+(type\s)?[^'"]*?from\s+'([^']+)'|import\(\s*'([^']+)'\s*\)|^import\s+'([^']+)'/gm,
      ),
  ]
    .map((match) => ({ typeOnly: Boolean(match[1]), named: match[2] ?? match[3] ?? match[4]! }))
    .filter(({ named }) => named.startsWith('.') || named.startsWith('#'))
    .map(({ typeOnly, named }) => ({
      from,
      typeOnly,
      to: named.startsWith('#')
        ? named.slice(1)
        : relative(root, resolve(root, dirname(from), named)),
    })),
)

const houseOf = (file: string) => file.split('/')[0]!
const roomOf = (file: string) => (file.split('/').length > 2 ? file.split('/')[1]! : '(root)')
const say = (found: Import[]) => found.map(({ from, to }) => `${from} → ${to}`)

test('the test sees the imports it judges', () => {
  expect(files.length).toBeGreaterThan(100)
  expect(imports.length).toBeGreaterThan(200)
  expect(
    imports.some(({ from, to }) => from === 'server/app.ts' && to === 'server/routes.ts'),
  ).toBe(true)
})

test('each house imports only from the houses below it', () => {
  const below: Record<string, string[]> = {
    shared: ['shared'],
    db: ['db', 'shared'],
    server: ['server', 'db', 'shared'],
    src: ['src', 'shared'],
    'fake-idp': ['fake-idp'],
  }
  expect(
    say(imports.filter(({ from, to }) => !below[houseOf(from)]!.includes(houseOf(to)))),
  ).toEqual([])
})

test('statistics and breath import nothing of ours, figures only statistics and the words of numbers', () => {
  const allowed: Record<string, string[]> = {
    statistics: ['shared/statistics/'],
    breath: ['shared/breath/'],
    figures: ['shared/figures/', 'shared/statistics/', 'shared/terms/numbers.ts'],
  }
  const wrong = imports.filter(
    ({ from, to }) =>
      houseOf(from) === 'shared' &&
      allowed[roomOf(from)] &&
      !allowed[roomOf(from)]!.some((place) => to.startsWith(place)),
  )
  expect(say(wrong)).toEqual([])
})

test('within src: app → pages → features → forms → ui → api, and never back', () => {
  const order = ['app', 'pages', 'features', 'forms', 'ui', 'api']
  const inSrc = imports.filter(({ from, to }) => houseOf(from) === 'src' && houseOf(to) === 'src')
  const rooms = new Set(files.filter((file) => houseOf(file) === 'src').map(roomOf))
  expect([...rooms].filter((room) => !order.includes(room))).toEqual([])
  expect(
    say(inSrc.filter(({ from, to }) => order.indexOf(roomOf(from)) > order.indexOf(roomOf(to)))),
  ).toEqual([])
})

test('within server: the root → features → everything else, and never back', () => {
  const rank = (file: string) => ({ '(root)': 0, features: 1 })[roomOf(file)] ?? 2
  // The configuration and the thread's start stand at the edge: one is read by all, the other starts all.
  const edge = ['server/config.ts', 'server/jobs/thread.ts']
  const wrong = imports.filter(
    ({ from, to }) =>
      houseOf(from) === 'server' &&
      houseOf(to) === 'server' &&
      roomOf(from) !== 'local' &&
      !edge.includes(from) &&
      !edge.includes(to) &&
      rank(from) > rank(to),
  )
  expect(say(wrong)).toEqual([])
})

test("a feature imports another feature's reads alone; pages are where features meet", () => {
  const featureOf = (file: string) => /^(server|src)\/features\/([^/]+)\//.exec(file)?.[2]
  const wrong = imports.filter(({ from, to }) => {
    const one = featureOf(from)
    const other = featureOf(to)
    return one && other && one !== other && !(houseOf(to) === 'server' && to.endsWith('.reads.ts'))
  })
  expect(say(wrong)).toEqual([])
})

test('only server/changes holds a writable database', () => {
  const holders = imports.filter(({ to }) => to === 'db/writer.ts').map(({ from }) => from)
  expect(holders.length).toBeGreaterThan(0)
  expect(holders.filter((file) => !file.startsWith('server/changes/'))).toEqual([])
  const current = files.filter((file) =>
    /\bcurrent\b.*from '(\.\/client\.ts|#db\/client\.ts)'/.test(text.get(file)!),
  )
  expect(current).toEqual(['db/writer.ts'])
  const pools = files.filter(
    (file) =>
      /\b(createPool|createConnection)\(/.test(text.get(file)!) && houseOf(file) === 'server',
  )
  expect(pools.filter((file) => !file.startsWith('server/local/'))).toEqual([])
})

test('writers without a study are the named ones', () => {
  const callers = files
    .filter((file) => /\bwritePassing\(/.test(text.get(file)!))
    .map((file) => file.split('/').slice(0, 2).join('/'))
  expect([...new Set(callers)].sort()).toEqual([
    'server/auth',
    'server/http',
    'server/jobs',
    'server/mail',
  ])
})

test('every statistic is reached by a screen, a report or a job', () => {
  const reached = new Set<string>()
  const walk = (file: string) => {
    if (reached.has(file)) return
    reached.add(file)
    for (const { to } of imports.filter(({ from }) => from === file)) walk(to)
  }
  // Workers and threads are started by their address, which no import shows.
  const starts = files.filter((file) =>
    /(^src\/app\/main\.tsx|^server\/main\.ts|[tT]hread\.ts|[wW]orker\.ts)$/.test(file),
  )
  for (const file of starts) walk(file)
  const statistics = files.filter(
    (file) => file.startsWith('shared/statistics/') && !file.endsWith('.d.ts'),
  )
  expect(statistics.length).toBeGreaterThan(100)
  expect(statistics.filter((file) => !reached.has(file))).toEqual([])
})

test('no import goes round in a circle', () => {
  const graph = new Map<string, string[]>()
  for (const { from, to, typeOnly } of imports)
    if (!typeOnly) graph.set(from, [...(graph.get(from) ?? []), to])
  const done = new Set<string>()
  const circles: string[] = []
  const walk = (file: string, path: string[]) => {
    if (path.includes(file)) circles.push([...path.slice(path.indexOf(file)), file].join(' → '))
    else if (!done.has(file)) {
      for (const next of graph.get(file) ?? []) walk(next, [...path, file])
      done.add(file)
    }
  }
  for (const file of files) walk(file, [])
  expect(circles).toEqual([])
})

test('no file only passes on what others export, and none is called index, utils, helpers or misc', () => {
  const barrels = files.filter((file) => {
    const lines = text
      .get(file)!
      .split('\n')
      .filter((line) => line.trim() && !line.trim().startsWith('//'))
    return lines.length > 0 && lines.every((line) => /^export .* from /.test(line))
  })
  expect(barrels).toEqual([])
  expect(
    files.filter((file) => /(^|\/)(index|utils?|helpers?|misc)(\.tsx?|\/)/.test(file)),
  ).toEqual([])
})

test('the server uses nothing that only a browser has', () => {
  const browser = /(?<![.\w'"`])(window|document|localStorage|sessionStorage|navigator)\.\w/
  const wrong = files
    .filter((file) => ['server', 'db'].includes(houseOf(file)))
    // A parameter of one of these names is no global.
    .filter((file) => {
      const source = text.get(file)!.replace(/\/\*[\s\S]*?\*\/|\/\/.*|`[^`]*`/g, '')
      const match = browser.exec(source)
      return (
        match &&
        !new RegExp(
          `[({,]\\s*(const\\s+)?${match[1]}\\b\\s*[:,})=]|(const|let) ${match[1]}\\b|\\b${match[1]}(: \\w+)?[,)]`,
        ).test(source)
      )
    })
  expect(wrong).toEqual([])
})
