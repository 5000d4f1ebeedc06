import { mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { SetUpError } from '#db/SetUpError.ts'
import { buildProduct } from '#server/local/build.ts'
import { freePorts } from '#server/local/localPorts.ts'
import { startStack } from '#server/local/stack.ts'
import { isAlive } from './stackIsAlive.ts'

/**
 * The built product on free ports with a throw-away database, for the browser journeys. A process of
 * its own: it stops, and takes its folder with it, on a signal or when its parent is gone.
 */
const stopping = new AbortController()
const stopped = new Promise<void>((resolve) => {
  const stop = () => {
    stopping.abort()
    resolve()
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, stop)
  process.on('disconnect', stop)
})

// Inside the checkout, where the built server finds its packages; ignored by git.
const runs = join(import.meta.dirname, '../../.local/test')
mkdirSync(runs, { recursive: true })
for (const name of readdirSync(runs))
  if (!isAlive(Number.parseInt(name, 10))) rmSync(join(runs, name), { recursive: true })
const folder = mkdtempSync(join(runs, `${process.pid}-`))

try {
  const built = { client: join(folder, 'client'), server: join(folder, 'server') }
  await buildProduct(built)
  const stack = await startStack({
    folder,
    ports: await freePorts(),
    client: { clientFolder: built.client, serverFile: join(built.server, 'main.js') },
    demoData: true,
    forTests: true,
    // Many people share one address here.
    env: { BREATHMARK_REQUESTS_PER_MINUTE: '100000' },
    signal: stopping.signal,
    say: (line) => console.log(line),
  })
  const { publicUrl, issuer, mailPageUrl, people, database } = stack
  const { migrateUrl } = database
  process.send?.({ publicUrl, issuer, mailPageUrl, people, migrateUrl, folder })
  const fault = await Promise.race([stack.broken, stopped])
  if (fault) console.error(fault)
  await stack.stop()
} catch (error) {
  console.error(error instanceof SetUpError ? error.message : error)
  process.exitCode = 1
} finally {
  rmSync(folder, { recursive: true, force: true })
  if (process.connected) process.disconnect()
}
