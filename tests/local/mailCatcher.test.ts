import nodemailer from 'nodemailer'
import { expect, test } from 'vitest'
import { freePort } from '#db/ports.ts'
import { type CaughtMail, startMailCatcher } from '#server/local/mailCatcher.ts'

test('a mail is caught, shown escaped on the page and told as JSON; after a stop and a start it catches again', async () => {
  const ports = { smtpPort: await freePort(), pagePort: await freePort() }
  const transport = nodemailer.createTransport(`smtp://127.0.0.1:${ports.smtpPort}`)
  const send = (subject: string) =>
    transport.sendMail({
      from: 'breathmark@hospital.example',
      to: 'monitor-oversight@hospital.example',
      subject,
      text: 'Grüße: see http://127.0.0.1:4173/studies?a=1&b=2',
    })

  const first = await startMailCatcher(ports)
  await send('A report <b>is there</b>')
  const address = `http://127.0.0.1:${ports.pagePort}`
  const mails = (await (await fetch(`${address}/mails.json`)).json()) as CaughtMail[]
  expect(mails).toEqual([
    {
      receivedAt: expect.stringMatching(/^\d{4}-.*Z$/),
      from: 'breathmark@hospital.example',
      to: ['monitor-oversight@hospital.example'],
      subject: 'A report <b>is there</b>',
      text: expect.stringContaining('Grüße: see http://127.0.0.1:4173/studies?a=1&b=2'),
    },
  ])
  const page = await (await fetch(address)).text()
  expect(page).toContain('A report &#60;b&#62;is there')
  expect(page).not.toContain('<b>is there')
  await first.stop()

  await expect(send('Nobody is there')).rejects.toMatchObject({ code: 'ESOCKET' })
  const second = await startMailCatcher(ports)
  await send('Somebody is there again')
  expect(second.mails().map((mail) => mail.subject)).toEqual(['Somebody is there again'])
  await second.stop()
})
