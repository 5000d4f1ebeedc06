import { once } from 'node:events'
import { createServer } from 'node:http'
import { pathToFileURL } from 'node:url'
import { simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'

export type CaughtMail = {
  receivedAt: string
  from: string
  to: string[]
  subject: string
  text: string
}

export type MailCatcher = {
  smtpPort: number
  pagePort: number
  mails: () => readonly CaughtMail[]
  stop: () => Promise<void>
}

/** Enough for a demonstration; the oldest goes when another comes. */
const MOST_MAILS = 500
const LARGEST_MAIL_BYTES = 1_000_000

/**
 * Takes every mail and delivers none: it keeps them in memory and shows them on a plain page, and
 * at /mails.json for tests. Both ports are on loopback.
 */
export async function startMailCatcher(ports: {
  smtpPort: number
  pagePort: number
}): Promise<MailCatcher> {
  const mails: CaughtMail[] = []
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    disableReverseLookup: true,
    size: LARGEST_MAIL_BYTES,
    onData: (stream, session, done) => {
      const to = session.envelope.rcptTo.map((recipient) => recipient.address)
      simpleParser(stream).then((mail) => {
        mails.unshift({
          receivedAt: new Date().toISOString(),
          from: mail.from?.text ?? '',
          to,
          subject: mail.subject ?? '',
          text: mail.text ?? '',
        })
        mails.length = Math.min(mails.length, MOST_MAILS)
        done()
      }, done)
    },
  })
  // A client that hangs up in the middle is no reason to end.
  smtp.on('error', (error) => console.error(error.message))
  smtp.listen(ports.smtpPort, '127.0.0.1')
  const page = createServer((request, response) => {
    const json = request.url === '/mails.json'
    response.writeHead(200, {
      'Content-Type': json ? 'application/json' : 'text/html; charset=utf-8',
      'Content-Security-Policy': "default-src 'none'; style-src 'unsafe-inline'",
      'Cache-Control': 'no-store',
    })
    response.end(json ? JSON.stringify(mails) : mailPage(mails))
  }).listen(ports.pagePort, '127.0.0.1')
  await Promise.all([once(smtp.server, 'listening'), once(page, 'listening')])
  return {
    ...ports,
    mails: () => mails,
    stop: async () => {
      page.closeAllConnections()
      await Promise.all([
        new Promise<void>((resolve) => smtp.close(resolve)),
        new Promise((resolve) => page.close(resolve)),
      ])
    },
  }
}

const escapeHtml = (text: string): string =>
  text.replace(/[&<>"]/g, (sign) => `&#${sign.charCodeAt(0)};`)

function mailPage(mails: readonly CaughtMail[]): string {
  const articles = mails.map(
    (mail) => `<article><h2>${escapeHtml(mail.subject)}</h2>
<p>To ${escapeHtml(mail.to.join(', '))} · ${mail.receivedAt.slice(0, 19).replace('T', ' ')} UTC</p>
<pre>${escapeHtml(mail.text).replace(/https?:\/\/[^\s<]+/g, (link) => `<a href="${link}">${link}</a>`)}</pre></article>`,
  )
  return `<!doctype html><html lang="en-GB"><meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1"><title>Caught mail</title>
<style>body{font:16px/1.5 system-ui,sans-serif;max-width:46rem;margin:2rem auto;padding:0 1rem;color:#1f2a2e;background:#eef1f0}
article{background:#fff;border:1px solid #cfd8d6;border-radius:6px;padding:1rem;margin:1rem 0}h2{font-size:1.1rem;margin:0}pre{white-space:pre-wrap;font:inherit}</style>
<h1>Caught mail</h1><p>Mail that Breathmark sent here. None of it left this machine.</p>
${articles.join('\n') || '<p>No mail yet. Load the page again to look.</p>'}</html>`
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const catcher = await startMailCatcher({
    smtpPort: Number(process.env.MAIL_CATCHER_SMTP_PORT),
    pagePort: Number(process.env.MAIL_CATCHER_PAGE_PORT),
  })
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.once(signal, () => void catcher.stop().then(() => process.exit(0)))
  process.send?.('listening')
}
