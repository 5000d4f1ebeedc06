import { once } from 'node:events'
import { createServer } from 'node:net'
import { expect, onTestFinished, test } from 'vitest'
import { SetUpError } from '#db/SetUpError.ts'
import { assertPortsFree, freePorts, portsFrom } from '#server/local/localPorts.ts'

test('without a word in the environment the ports are the usual ones, and each can be moved', () => {
  const usual = portsFrom({})
  expect(usual.client).toBe(4173)
  expect(portsFrom({ BREATHMARK_CLIENT_PORT: '8080' })).toEqual({ ...usual, client: 8080 })
})

test.each(['no number', '0', '70000', '80.5'])('the port "%s" is refused by name', (said) => {
  expect(() => portsFrom({ BREATHMARK_IDP_PORT: said })).toThrow(
    new SetUpError(`BREATHMARK_IDP_PORT must be a port from 1 to 65535, not "${said}".`),
  )
})

test('one port for two parts is refused with the names of both', () => {
  expect(() => portsFrom({ BREATHMARK_API_PORT: '4173' })).toThrow(
    new SetUpError('Port 4173 is given to both the client and the API.'),
  )
})

test('a busy port is named with its part and the variable that moves it', async () => {
  const ports = await freePorts()
  const other = createServer().listen(ports.smtp, '127.0.0.1')
  await once(other, 'listening')
  onTestFinished(() => void other.close())
  await expect(assertPortsFree(ports)).rejects.toThrow(
    new SetUpError(
      `Port ${ports.smtp} for the mail catcher is in use by another program: stop that, or set BREATHMARK_SMTP_PORT to a free port.`,
    ),
  )
})
