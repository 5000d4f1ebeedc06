import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { join } from 'node:path'

/** What the browser journeys know of the product under test. */
export type StackUnderTest = {
  publicUrl: string
  issuer: string
  mailPageUrl: string
  people: { subject: string; name: string }[]
  /** Owner's address of the database, to look behind the screens. */
  migrateUrl: string
  folder: string
}

const VARIABLE = 'BREATHMARK_UNDER_TEST'
const root = join(import.meta.dirname, '../..')

/** Where the journeys' processes read it. @throws outside of a run */
export function stackUnderTest(): StackUnderTest {
  const said = process.env[VARIABLE]
  if (!said) throw new Error('The journeys run through tests/e2e/playwright.config.ts.')
  return JSON.parse(said)
}

/**
 * Playwright's global set-up: builds and starts the product in a process of its own, and resolves
 * to what stops it again.
 */
export default async function startForJourneys(): Promise<() => Promise<void>> {
  const child = spawn(
    'setpriv',
    [
      ...['--pdeathsig', 'TERM', '--'],
      ...[process.execPath, '--import', 'tsx', 'tests/support/stackProcess.ts'],
    ],
    { cwd: root, stdio: ['ignore', 'inherit', 'inherit', 'ipc'], detached: true },
  )
  const said = await new Promise<StackUnderTest>((resolve, reject) => {
    child.once('message', (message) => resolve(message as StackUnderTest))
    child.once('exit', () => reject(new Error('The product did not start; see above.')))
  })
  process.env[VARIABLE] = JSON.stringify(said)
  return async () => {
    const ended = once(child, 'exit')
    child.kill('SIGTERM')
    if (child.exitCode === null && child.signalCode === null) await ended
  }
}
