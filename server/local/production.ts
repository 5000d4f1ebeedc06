import { spawn } from 'node:child_process'
import { join } from 'node:path'
import { migrate } from '#db/migrate.ts'
import { readConfig } from '#server/config.ts'
import { buildProduct } from './build.ts'

/**
 * `npm run production`: builds the product, brings the database up to date where the owner's address
 * is given, and runs the built server, which serves the built client too. Database, identity
 * provider, mail server and TLS are the hospital's, named by the environment.
 */
const root = join(import.meta.dirname, '../..')
const folders = { client: join(root, 'dist/client'), server: join(root, 'dist/server') }

try {
  const { BREATHMARK_MIGRATE_DATABASE_URL: owner, BREATHMARK_ACCOUNTS_HOST, ...env } = process.env
  const environment = { BREATHMARK_CLIENT_DIR: folders.client, ...env, NODE_ENV: 'production' }
  readConfig(environment)
  console.log('Building the client and the server')
  await buildProduct(folders)
  if (owner) {
    console.log('Bringing the database up to date')
    await migrate(owner, BREATHMARK_ACCOUNTS_HOST)
  }
  process.exitCode = await serve(environment)
} catch (error) {
  console.error((error as Error).message)
  process.exitCode = 1
}

/** The server's own process never learns the address of the database's owner. */
function serve(env: NodeJS.ProcessEnv): Promise<number> {
  const server = spawn(process.execPath, [join(folders.server, 'main.js')], {
    cwd: root,
    env,
    stdio: 'inherit',
  })
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const)
    process.on(signal, () => server.kill(signal === 'SIGHUP' ? 'SIGTERM' : signal))
  return new Promise((resolve) => server.once('close', (code) => resolve(code ?? 1)))
}
