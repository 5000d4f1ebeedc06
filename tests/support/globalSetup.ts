import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { TestProject } from 'vitest/node'
import { type LocalMariaDb, startLocalMariaDb } from '#db/localMariaDb.ts'
import { isAlive } from './stackIsAlive.ts'

declare module 'vitest' {
  export interface ProvidedContext {
    /** Socket that answers with the addresses of this run's database server. */
    databaseServer: string
  }
}

const PREFIX = 'breathmark-test-'

/**
 * One throw-away MariaDB for a run, started when a test first asks for it, so that a run without a
 * database has none. The data lie in a folder that goes with the run.
 */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  removeAbandoned()
  const folder = mkdtempSync(join(tmpdir(), `${PREFIX}${process.pid}-`))
  let started: Promise<LocalMariaDb> | undefined
  const desk = createServer(async (socket) => {
    socket.on('error', () => undefined)
    started ??= startLocalMariaDb({ folder: join(folder, 'mariadb'), forTests: true })
    const answer = await started.catch((error: Error) => ({ fault: error.message }))
    socket.end(JSON.stringify(answer))
  })
  const address = join(folder, 'desk.sock')
  await new Promise<void>((resolve) => desk.listen(address, resolve))
  project.provide('databaseServer', address)
  return async () => {
    desk.close()
    await started?.then(
      (server) => server.stop(),
      () => undefined,
    )
    rmSync(folder, { recursive: true, force: true })
  }
}

/** A run that was killed leaves its folder; its process number tells that it is gone. */
function removeAbandoned(): void {
  for (const name of readdirSync(tmpdir())) {
    const owner = Number(/^breathmark-test-(\d+)-/.exec(name)?.[1])
    if (!owner || isAlive(owner)) continue
    rmSync(join(tmpdir(), name), { recursive: true, force: true })
  }
}
