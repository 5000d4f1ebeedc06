import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, test } from 'vitest'
import { countJourneys, countVitest } from '#server/local/testCounts.ts'
import { temporaryFolder } from './temporaryFolder.ts'

function report(content: unknown): string {
  const file = join(temporaryFolder(), 'report.json')
  writeFileSync(file, typeof content === 'string' ? content : JSON.stringify(content))
  return file
}

test('a file that breaks before its first test counts as a failure', () => {
  const file = report({
    numPassedTests: 5,
    numFailedTests: 1,
    numPendingTests: 2,
    numTodoTests: 0,
    testResults: [
      { status: 'failed', assertionResults: [{ status: 'failed' }, { status: 'passed' }] },
      { status: 'failed', assertionResults: [] },
      { status: 'passed', assertionResults: [{ status: 'passed' }] },
    ],
  })
  expect(countVitest(file)).toEqual({ passed: 5, failed: 2, skipped: 2 })
})

test('a journey that passed at a second try, and an error outside of all journeys, are failures', () => {
  const stats = { expected: 3, unexpected: 1, flaky: 1, skipped: 1 }
  const file = report({ errors: [{ message: 'set-up failed' }], stats })
  expect(countJourneys(file)).toEqual({ passed: 3, failed: 3, skipped: 1 })
})

test.each([countVitest, countJourneys])('a missing or broken report is a failure (%o)', (count) => {
  const failed = { passed: 0, failed: 1, skipped: 0 }
  expect(count('/no/such/report.json')).toEqual(failed)
  expect(count(report('{"numPassedTests": 5'))).toEqual(failed)
  expect(count(report({ numPassedTests: 5 }))).toEqual(failed)
})
