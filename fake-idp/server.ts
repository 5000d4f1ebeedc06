import { once } from 'node:events'
import { createServer } from 'node:http'
import { pathToFileURL } from 'node:url'
import express, { type ErrorRequestHandler, type Express, type RequestHandler } from 'express'
import type Provider from 'oidc-provider'
import { FAULTS, type Fault } from './faults.ts'
import { faultPage, signInPage } from './pages.ts'
import { PEOPLE, personOf } from './people.ts'
import { createProvider, type ProviderOptions } from './provider.ts'

export type FakeIdp = {
  issuer: string
  port: number
  /** From now on every answer carries the fault; null mends it. */
  setFault: (fault: Fault | null) => void
  stop: () => Promise<void>
}

type FakeIdpOptions = Omit<ProviderOptions, 'issuer'> & {
  port: number
  issuer?: string
  /** Opens PUT /control/fault, which tests use from another process. */
  controls?: boolean
}

/** Starts the stand-in identity provider on loopback. @throws when the port is in use */
export async function startFakeIdp(options: FakeIdpOptions): Promise<FakeIdp> {
  const { port, controls = false } = options
  const issuer = options.issuer ?? `http://127.0.0.1:${port}`
  let fault: Fault | null = null
  const setFault = (next: Fault | null) => {
    fault = next
  }
  const provider = createProvider({ ...options, issuer }, () => fault)
  const app = express()
  app.disable('x-powered-by')
  app.use(plainPages)
  addInteraction(app, provider)
  if (controls) addControls(app, setFault)
  app.use(provider.callback())
  app.use(answerFault)
  const server = createServer(app).listen(port, '127.0.0.1')
  await once(server, 'listening')
  return {
    issuer,
    port,
    setFault,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve())
        server.closeAllConnections()
      }),
  }
}

/**
 * No script of ours; the provider adds the digest of the one line with which it sends a form on. A
 * form may lead back to the application, so form-action stays open.
 */
const plainPages: RequestHandler = (_request, response, next) => {
  response.set({
    'Content-Security-Policy':
      "default-src 'none'; script-src 'self'; style-src 'unsafe-inline'; base-uri 'none'; frame-ancestors 'none'",
    'Cache-Control': 'no-store',
    'X-Content-Type-Options': 'nosniff',
    'Referrer-Policy': 'no-referrer',
  })
  next()
}

function addInteraction(app: Express, provider: Provider): void {
  const body = express.urlencoded({ extended: false, limit: '4kb' })
  app.get('/interaction/:uid', async (request, response) => {
    const { uid, prompt, session } = await provider.interactionDetails(request, response)
    response.send(signInPage({ action: `/interaction/${uid}`, ...situation(prompt, session) }))
  })
  app.post('/interaction/:uid', body, async (request, response) => {
    const { uid, prompt, session } = await provider.interactionDetails(request, response)
    if (request.body?.cancel) {
      const refusal = { error: 'access_denied', error_description: 'The sign-in was cancelled.' }
      await provider.interactionFinished(request, response, refusal)
      return
    }
    const person = personOf(String(request.body?.account ?? '').trim())
    if (!person) {
      const fault = 'There is no account with that user name.'
      const action = `/interaction/${uid}`
      response.status(422).send(signInPage({ action, ...situation(prompt, session), fault }))
      return
    }
    await provider.interactionFinished(
      request,
      response,
      { login: { accountId: person.subject, remember: false, amr: ['pwd'] } },
      { mergeWithLastSubmission: false },
    )
  })
}

type Details = Awaited<ReturnType<Provider['interactionDetails']>>

/** Whether somebody is signed in here already and is asked once more. */
function situation(prompt: Details['prompt'], session: Details['session']) {
  const current = session ? personOf(session.accountId) : undefined
  const again = prompt.reasons.some((reason) => reason === 'login_prompt' || reason === 'max_age')
  return { again: again && current !== undefined, current }
}

function addControls(app: Express, setFault: FakeIdp['setFault']): void {
  // A page of another site cannot send JSON here without asking first, and is not let.
  app.put('/control/fault', express.json(), (request, response) => {
    const wanted = request.body?.fault
    const fault = wanted === null ? null : FAULTS.find((each) => each === wanted)
    if (fault === undefined) {
      response.status(400).json({ fault: `One of null, ${FAULTS.join(', ')}.` })
      return
    }
    setFault(fault)
    response.json({ fault })
  })
}

const answerFault: ErrorRequestHandler = (error, _request, response, _next) => {
  const ended = error?.name === 'SessionNotFound'
  if (!ended) console.error(error)
  response
    .status(ended ? 400 : 500)
    .send(
      faultPage(
        ended
          ? 'This sign-in has ended or belongs to another browser. Go back to Breathmark and sign in again.'
          : 'The stand-in identity provider failed; its log says why.',
      ),
    )
}

/** As a process of its own: options from the environment, stopped by a signal. */
async function run(env: NodeJS.ProcessEnv): Promise<void> {
  const need = (name: string) => {
    const value = env[name]
    if (!value) throw new Error(`${name} is not set.`)
    return value
  }
  const idp = await startFakeIdp({
    port: Number(need('STAND_IN_PORT')),
    clientId: need('STAND_IN_CLIENT_ID'),
    clientSecret: need('STAND_IN_CLIENT_SECRET'),
    redirectUris: need('STAND_IN_REDIRECT_URIS').split(' '),
    postLogoutRedirectUris: need('STAND_IN_SIGN_OUT_URIS').split(' '),
    signingKey: env.STAND_IN_SIGNING_KEY,
    controls: env.STAND_IN_CONTROLS === 'true',
  })
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.once(signal, () => void idp.stop().then(() => process.exit(0)))
  console.log(`The stand-in identity provider listens at ${idp.issuer}.`)
  process.send?.({ ready: true, people: PEOPLE })
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href)
  await run(process.env)
