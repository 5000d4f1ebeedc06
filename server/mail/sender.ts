import { setTimeout as wait } from 'node:timers/promises'
import { and, asc, eq, lte } from 'drizzle-orm'
import nodemailer, { type Transporter } from 'nodemailer'
import { mails } from '#db/schema/mails.ts'
import { writePassing } from '#server/changes/passing.ts'
import { config } from '#server/config.ts'

const IDLE_WAIT_MS = 500
const FIRST_RETRY_MS = 2_000
const LONGEST_RETRY_MS = 15 * 60_000
/** About a week of quarter hours. */
const MOST_ATTEMPTS = 700
/** A letter's row is held while it is sent, so a mail server that says nothing is not waited for long. */
const SERVER_PATIENCE_MS = 15_000

/** Sends what waits in the outbox until the signal says stop; a server that is away is tried again. */
export async function sendMails(signal: AbortSignal): Promise<void> {
  const transport = nodemailer.createTransport(
    {
      url: config().BREATHMARK_SMTP_URL,
      connectionTimeout: SERVER_PATIENCE_MS,
      greetingTimeout: SERVER_PATIENCE_MS,
      socketTimeout: SERVER_PATIENCE_MS,
    },
    { from: config().BREATHMARK_MAIL_FROM },
  )
  while (!signal.aborted) {
    const found = await sendNext(transport).catch(logFault)
    if (!found) await wait(IDLE_WAIT_MS, undefined, { signal }).catch(() => undefined)
  }
  transport.close()
}

/** The database may be away for a moment; the outbox is still there when it is back. */
function logFault(error: unknown): false {
  console.error(JSON.stringify({ level: 'warn', event: 'mails.waiting', fault: String(error) }))
  return false
}

/** Sends one letter while it holds its row, so that no other process sends it too. */
async function sendNext(transport: Transporter): Promise<boolean> {
  return writePassing(async (tx) => {
    const now = new Date()
    const [mail] = await tx
      .select()
      .from(mails)
      .where(and(eq(mails.state, 'waiting'), lte(mails.nextAttemptAt, now)))
      .orderBy(asc(mails.nextAttemptAt))
      .limit(1)
      .for('update', { skipLocked: true })
    if (!mail) return false
    const attempts = mail.attempts + 1
    try {
      await transport.sendMail({
        to: mail.recipient,
        subject: mail.subject,
        text: mail.text,
        // The same letter keeps its name, should it ever go out twice.
        messageId: `<${mail.id}@breathmark.invalid>`,
      })
      await tx
        .update(mails)
        .set({ state: 'sent', sentAt: new Date(), attempts, failure: null })
        .where(eq(mails.id, mail.id))
    } catch (error) {
      const pause = Math.min(FIRST_RETRY_MS * 2 ** Math.min(attempts - 1, 20), LONGEST_RETRY_MS)
      await tx
        .update(mails)
        .set({
          attempts,
          state: attempts >= MOST_ATTEMPTS ? 'givenUp' : 'waiting',
          nextAttemptAt: new Date(Date.now() + pause),
          failure: String((error as Error).message).slice(0, 300),
        })
        .where(eq(mails.id, mail.id))
    }
    return true
  })
}
