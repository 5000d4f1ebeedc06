import { existsSync, readFileSync } from 'node:fs'
import { z } from 'zod'

export type TestCounts = { passed: number; failed: number; skipped: number }

const vitestReport = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  numPendingTests: z.number(),
  numTodoTests: z.number(),
  testResults: z.array(
    z.object({ status: z.string(), assertionResults: z.array(z.object({ status: z.string() })) }),
  ),
})

/** Counts of Vitest's JSON report. A file that failed without a failed test in it counts as one. */
export function countVitest(file: string): TestCounts {
  const report = read(file, vitestReport)
  if (!report) return { passed: 0, failed: 1, skipped: 0 }
  const brokenFiles = report.testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && !assertionResults.some((test) => test.status === 'failed'),
  )
  return {
    passed: report.numPassedTests,
    failed: report.numFailedTests + brokenFiles.length,
    skipped: report.numPendingTests + report.numTodoTests,
  }
}

const journeysReport = z.object({
  errors: z.array(z.unknown()),
  stats: z.object({
    expected: z.number(),
    unexpected: z.number(),
    flaky: z.number(),
    skipped: z.number(),
  }),
})

/** Counts of Playwright's JSON report. What passed only at a second try did not pass. */
export function countJourneys(file: string): TestCounts {
  const report = read(file, journeysReport)
  if (!report) return { passed: 0, failed: 1, skipped: 0 }
  const { expected, unexpected, flaky, skipped } = report.stats
  return { passed: expected, failed: unexpected + flaky + report.errors.length, skipped }
}

/** Undefined when the runner wrote no report, or none that can be read. */
function read<T>(file: string, shape: z.ZodType<T>): T | undefined {
  if (!existsSync(file)) return undefined
  try {
    return shape.parse(JSON.parse(readFileSync(file, 'utf8')))
  } catch {
    return undefined
  }
}
