import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { countJourneys, countVitest, type TestCounts } from './testCounts.ts'

/** `npm test`: types, lint, tests and browser journeys, one after the other, and what came of it. */
const root = join(import.meta.dirname, '../..')
const results = mkdtempSync(join(tmpdir(), 'breathmark-results-'))
const vitestFile = join(results, 'vitest.json')
const journeysFile = join(results, 'journeys.json')

type Step = {
  name: string
  words: string[]
  env?: Record<string, string>
  /** Reads the step's own report; types and lint have none. */
  counts?: () => TestCounts
}

const STEPS: Step[] = [
  { name: 'types', words: ['node_modules/typescript/bin/tsc', '--noEmit'] },
  { name: 'lint', words: ['node_modules/@biomejs/biome/bin/biome', 'check', '.'] },
  {
    name: 'tests',
    words: [
      ...['node_modules/vitest/vitest.mjs', 'run', '--reporter=dot', '--reporter=json'],
      `--outputFile.json=${vitestFile}`,
    ],
    counts: () => countVitest(vitestFile),
  },
  {
    name: 'browser journeys',
    words: [
      ...['node_modules/@playwright/test/cli.js', 'test'],
      ...['--config', 'tests/e2e/playwright.config.ts', '--reporter', 'list,json'],
    ],
    env: { PLAYWRIGHT_JSON_OUTPUT_FILE: journeysFile },
    counts: () => countJourneys(journeysFile),
  },
]

let current: ReturnType<typeof spawn> | undefined
let stopped = false
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const)
  process.on(signal, () => {
    stopped = true
    current?.kill(signal)
  })

const lines: string[] = []
const total: TestCounts = { passed: 0, failed: 0, skipped: 0 }
for (const step of STEPS) {
  if (stopped) break
  const began = performance.now()
  console.log(`\n── ${step.name}`)
  const code = await run(step)
  const counts = step.counts?.()
  // A step that fails without a failed test, because it broke off, is a failure all the same.
  const failed = Math.max(counts?.failed ?? 0, code === 0 ? 0 : 1)
  total.passed += counts?.passed ?? 0
  total.failed += failed
  total.skipped += counts?.skipped ?? 0
  const seconds = ((performance.now() - began) / 1000).toFixed(1).padStart(7)
  lines.push(`${step.name.padEnd(18)}${seconds} s   ${outcome(failed, counts)}`)
}
rmSync(results, { recursive: true, force: true })
if (stopped) {
  console.log('\nStopped before the end.')
  process.exitCode = 1
} else {
  console.log(`\n${lines.join('\n')}\n`)
  console.log(`${total.passed} passed, ${total.failed} failed`)
  process.exitCode = total.failed === 0 ? 0 : 1
}

function outcome(failed: number, counts: TestCounts | undefined): string {
  if (!counts) return failed === 0 ? 'in order' : 'NOT in order'
  const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : ''
  return `${counts.passed} passed, ${failed} failed${skipped}`
}

/** Runs a step with its output here; it is told to stop when this process dies. */
function run({ words, env }: Step): Promise<number> {
  return new Promise((resolve) => {
    const bound = ['--pdeathsig', 'TERM', '--', process.execPath]
    current = spawn('setpriv', [...bound, ...words], {
      cwd: root,
      env: { ...process.env, ...env },
      stdio: 'inherit',
    })
    current.once('close', (code) => resolve(code ?? 1))
  })
}
