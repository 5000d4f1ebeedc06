import { existsSync, mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { stopLeftOver } from '#db/leftOverServer.ts'
import { type LocalMariaDb, startLocalMariaDb } from '#db/localMariaDb.ts'
import { localMariaDbPaths } from '#db/localMariaDbFiles.ts'
import { migrate } from '#db/migrate.ts'
import { SetUpError } from '#db/SetUpError.ts'
import { type Child, finishChild, startChild, typescript } from './childProcess.ts'
import { assertPortsFree, type LocalPorts } from './localPorts.ts'
import { type LocalSecrets, localSecrets } from './localSecrets.ts'

export type StackOptions = {
  /** Private folder for data, secrets and logs. */
  folder: string
  ports: LocalPorts
  /** From its sources by Vite, or built and served by the built API. */
  client: 'sources' | { clientFolder: string; serverFile: string }
  /** Filled with the invented studies, once. */
  demoData: boolean
  forTests: boolean
  /** More of the API's environment; what the stack itself decides is not overruled. */
  env: Record<string, string>
  signal: AbortSignal
  /** Told of each step and of what the programs complain about. */
  say: (line: string) => void
}

export type Stack = {
  publicUrl: string
  issuer: string
  mailPageUrl: string
  people: { subject: string; name: string }[]
  database: Pick<LocalMariaDb, 'migrateUrl' | 'appUrl' | 'redactUrl'>
  /** Settles with a sentence when a part ends that nobody stopped. */
  broken: Promise<string>
  /** Stops every part in the reverse of the order in which they were started. */
  stop: () => Promise<void>
}

type Part = { name: string; ended: Promise<void>; stop: () => Promise<void> }

/**
 * Starts everything that the product needs on this machine, each part once the one before is ready.
 * When a part fails, those that run are stopped again.
 * @throws SetUpError with one sentence when something outside is in the way
 */
export async function startStack(options: StackOptions): Promise<Stack> {
  const { folder, ports, say, signal } = options
  const logFolder = join(folder, 'logs')
  mkdirSync(logFolder, { recursive: true, mode: 0o700 })
  const parts: Part[] = []
  const stop = async () => {
    for (let part = parts.pop(); part; part = parts.pop()) await part.stop()
  }
  const step = async <T>(words: string, work: () => Promise<T>): Promise<T> => {
    if (signal.aborted) throw new SetUpError('Stopped before everything had started.')
    const began = performance.now()
    const result = await work()
    say(`  ${words} ${((performance.now() - began) / 1000).toFixed(1)} s`)
    return result
  }
  const run = async (name: string, words: string[], env: Record<string, string>) => {
    const onError = (line: string) => name === 'API' && say(`${name}: ${line}`)
    const child = await startChild({ name, arguments: words, env, logFolder, signal, onError })
    parts.push(child)
    return child
  }

  try {
    await stopLeftOver(localMariaDbPaths(join(folder, 'mariadb')))
    await assertPortsFree(ports)
    const secrets = localSecrets(folder)
    const database = await step('MariaDB', async () => {
      const { mariaDb: port } = ports
      const { forTests } = options
      const server = await startLocalMariaDb({ folder: join(folder, 'mariadb'), port, forTests })
      parts.push({ ...server, name: 'MariaDB' })
      return server
    })
    await step('migrations and grants', () => migrate(database.migrateUrl))
    const publicUrl = `http://127.0.0.1:${options.client === 'sources' ? ports.client : ports.api}`
    const people = await step('stand-in identity provider', async () =>
      peopleOf(
        await run(
          'identity provider',
          typescript('fake-idp/server.ts'),
          idpEnvironment(ports, publicUrl, secrets, options.forTests),
        ),
      ),
    )
    const env = { ...options.env, ...apiEnvironment(options, publicUrl, database, secrets) }
    await step('mail catcher', () =>
      run('mail catcher', typescript('server/local/mailCatcher.ts'), {
        MAIL_CATCHER_SMTP_PORT: String(ports.smtp),
        MAIL_CATCHER_PAGE_PORT: String(ports.mailPage),
      }),
    )
    const api =
      options.client === 'sources' ? typescript('server/main.ts') : [options.client.serverFile]
    await step('API', () => run('API', api, env))
    if (options.client === 'sources')
      await step('client', () =>
        run('client', typescript('server/local/viteServer.ts'), {
          BREATHMARK_CLIENT_PORT: String(ports.client),
          BREATHMARK_API_PORT: String(ports.api),
        }),
      )
    if (options.demoData && !existsSync(demoDataMark(folder)))
      await step('demonstration data', () => makeDemoData({ publicUrl, folder, logFolder, signal }))
    const broken = Promise.race(
      parts.map((part) => part.ended.then(() => `The ${part.name} ended; see ${logFolder}.`)),
    )
    return {
      publicUrl,
      issuer: env.BREATHMARK_OIDC_ISSUER!,
      mailPageUrl: `http://127.0.0.1:${ports.mailPage}`,
      people,
      database,
      broken,
      stop,
    }
  } catch (error) {
    await stop()
    throw error
  }
}

function idpEnvironment(
  ports: LocalPorts,
  publicUrl: string,
  secrets: LocalSecrets,
  forTests: boolean,
): Record<string, string> {
  return {
    STAND_IN_PORT: String(ports.idp),
    STAND_IN_CLIENT_ID: 'breathmark',
    STAND_IN_CLIENT_SECRET: secrets.client,
    STAND_IN_SIGNING_KEY: secrets.signingKey,
    STAND_IN_REDIRECT_URIS: `${publicUrl}/auth/callback`,
    STAND_IN_SIGN_OUT_URIS: `${publicUrl}/`,
    STAND_IN_CONTROLS: String(forTests),
  }
}

function apiEnvironment(
  { ports, client }: StackOptions,
  publicUrl: string,
  database: LocalMariaDb,
  secrets: LocalSecrets,
): Record<string, string> {
  return {
    NODE_ENV: client === 'sources' ? 'development' : 'production',
    ...(client === 'sources' ? {} : { BREATHMARK_CLIENT_DIR: client.clientFolder }),
    BREATHMARK_PORT: String(ports.api),
    BREATHMARK_PUBLIC_URL: publicUrl,
    BREATHMARK_DATABASE_URL: database.appUrl,
    BREATHMARK_REDACT_DATABASE_URL: database.redactUrl,
    BREATHMARK_OIDC_ISSUER: `http://127.0.0.1:${ports.idp}`,
    BREATHMARK_OIDC_CLIENT_ID: 'breathmark',
    BREATHMARK_OIDC_CLIENT_SECRET: secrets.client,
    BREATHMARK_OIDC_STAND_IN: 'true',
    BREATHMARK_SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    BREATHMARK_MAIL_FROM: 'breathmark@hospital.example',
    BREATHMARK_SECRET: secrets.application,
  }
}

const peopleOf = (idp: Child): Stack['people'] => (idp.said as Pick<Stack, 'people'>).people
const demoDataMark = (folder: string) => join(folder, 'demo-data.made')

/** Played through the product's own doors; a run that was broken off is completed by the next. */
async function makeDemoData(options: {
  publicUrl: string
  folder: string
  logFolder: string
  signal: AbortSignal
}): Promise<void> {
  const { publicUrl, folder, logFolder, signal } = options
  const name = 'demonstration data'
  const program = typescript('server/local/demonstration.ts')
  const env = { DEMONSTRATION_PRODUCT_URL: publicUrl }
  await finishChild({ name, arguments: program, env, logFolder, signal })
  writeFileSync(demoDataMark(folder), new Date().toISOString())
}
