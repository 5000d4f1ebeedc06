import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import { eq } from 'drizzle-orm'
import { type ParsedMail, simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'
import { afterAll, afterEach, beforeAll, expect, test, vi } from 'vitest'
import { mails } from '#db/schema/mails.ts'
import { change } from '#server/changes/change.ts'
import { config, setConfig } from '#server/config.ts'
import { writeLetters } from '#server/mail/outbox.ts'
import { sendMails } from '#server/mail/sender.ts'
import { type Api, aKey, startApi } from '../support/api.ts'

let api: Api
beforeAll(async () => {
  api = await startApi()
})
afterAll(() => api.stop())

let stopAll: (() => Promise<unknown>)[] = []
afterEach(async () => {
  for (const stop of stopAll.reverse()) await stop()
  stopAll = []
})

/** A real mail server on loopback that keeps what it gets. */
async function mailServer(port = 0, options: { refuseFirst?: number } = {}) {
  const received: ParsedMail[] = []
  let refusals = options.refuseFirst ?? 0
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData: (stream, _session, done) => {
      simpleParser(stream).then((mail) => {
        if (refusals-- > 0) {
          done(Object.assign(new Error('Try again later'), { responseCode: 451 }))
          return
        }
        received.push(mail)
        done()
      }, done)
    },
  })
  server.listen(port, '127.0.0.1')
  await once(server.server, 'listening')
  const close = () => new Promise<void>((resolve) => server.close(resolve))
  return { received, close, port: (server.server.address() as AddressInfo).port }
}

/** The sender as the worker thread runs it, against a server on this port. */
function sending(port: number): void {
  setConfig({ ...config(), BREATHMARK_SMTP_URL: `smtp://127.0.0.1:${port}` })
  const stop = new AbortController()
  const ended = sendMails(stop.signal)
  stopAll.push(() => {
    stop.abort()
    return ended
  })
}

/** A change of a study that writes letters, as the issuing of a report does. */
async function writtenLetters(recipients: string[], fail = false) {
  const study = await api.given.study()
  const analyst = await api.given.member(study, { role: 'analyst' })
  const actor = {
    personId: analyst.id,
    name: analyst.name,
    email: null,
    roles: ['analyst'] as const,
    loginIdHash: '',
    requestId: aKey(),
    localOffset: null,
    idleExpiresAt: new Date(),
  }
  const letters = recipients.map((recipient) => ({
    recipient,
    subject: 'A report can be read',
    text: 'Sign in to read it.',
  }))
  await change({ actor, action: 'report.store', of: { studyId: study.id } }, async (tx) => {
    await writeLetters(tx, letters)
    if (fail) throw new Error('The change is taken back.')
  }).catch((error: Error) => {
    if (!fail) throw error
  })
  return () => api.fixtures.select().from(mails).where(eq(mails.studyId, study.id))
}

const WITHIN = { timeout: 20_000, interval: 50 }

test('letters wait while the mail server is down and go out once each when it is back', async () => {
  const { port, close } = await mailServer()
  await close()
  const outbox = await writtenLetters(['one@hospital.example', 'two@hospital.example'])
  sending(port)
  await vi.waitFor(async () => {
    for (const mail of await outbox()) {
      expect(mail.attempts).toBeGreaterThan(0)
      expect(mail).toMatchObject({ state: 'waiting', sentAt: null })
      expect(mail.failure).toMatch(/ECONNREFUSED/)
    }
  }, WITHIN)

  const back = await mailServer(port)
  stopAll.unshift(back.close)
  await vi.waitFor(async () => {
    expect((await outbox()).map((mail) => mail.state)).toEqual(['sent', 'sent'])
  }, WITHIN)
  expect(back.received).toHaveLength(2)
  const mail = back.received.find(({ to }) => [to].flat()[0]?.text === 'one@hospital.example')
  expect(mail).toMatchObject({ subject: 'A report can be read', html: false })
  expect(mail?.text?.trim()).toBe('Sign in to read it.')
  expect(mail?.from?.text).toBe('breathmark@hospital.example')
  for (const each of await outbox()) expect(each).toMatchObject({ failure: null })
})

test('a letter that the server puts off is tried again', async () => {
  const server = await mailServer(0, { refuseFirst: 1 })
  stopAll.unshift(server.close)
  const outbox = await writtenLetters(['one@hospital.example'])
  sending(server.port)
  await vi.waitFor(async () => {
    expect(await outbox()).toMatchObject([{ state: 'sent', attempts: 2 }])
  }, WITHIN)
  expect(server.received).toHaveLength(1)
})

test('two senders at once send each letter once', async () => {
  const server = await mailServer()
  stopAll.unshift(server.close)
  const recipients = Array.from({ length: 12 }, (_, at) => `person${at}@hospital.example`)
  const outbox = await writtenLetters(recipients)
  sending(server.port)
  sending(server.port)
  await vi.waitFor(async () => {
    expect((await outbox()).every((mail) => mail.state === 'sent')).toBe(true)
  }, WITHIN)
  const got = server.received.map(({ to }) => [to].flat()[0]?.text)
  expect(got.sort()).toEqual([...recipients].sort())
})

test('a change that is taken back leaves no letter behind', async () => {
  const outbox = await writtenLetters(['one@hospital.example'], true)
  expect(await outbox()).toEqual([])
})
