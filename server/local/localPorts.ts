import { setTimeout as wait } from 'node:timers/promises'
import { freePort, portIsFree } from '#db/ports.ts'
import { SetUpError } from '#db/SetUpError.ts'

/** What listens where on loopback, the variable that moves it, and where it is without one. */
const PORTS = {
  client: { words: 'the client', variable: 'BREATHMARK_CLIENT_PORT', usual: 4173 },
  api: { words: 'the API', variable: 'BREATHMARK_API_PORT', usual: 4100 },
  mariaDb: { words: 'MariaDB', variable: 'BREATHMARK_MARIADB_PORT', usual: 4306 },
  idp: {
    words: 'the stand-in identity provider',
    variable: 'BREATHMARK_IDP_PORT',
    usual: 4200,
  },
  smtp: { words: 'the mail catcher', variable: 'BREATHMARK_SMTP_PORT', usual: 4225 },
  mailPage: {
    words: 'the page of caught mail',
    variable: 'BREATHMARK_MAIL_PAGE_PORT',
    usual: 4226,
  },
} as const

type PortName = keyof typeof PORTS
export type LocalPorts = Record<PortName, number>
const names = Object.keys(PORTS) as PortName[]

/** @throws SetUpError for a number that is no port, and for one that is wanted twice */
export function portsFrom(env: NodeJS.ProcessEnv): LocalPorts {
  const ports = Object.fromEntries(
    names.map((name) => [name, portFrom(env, PORTS[name])]),
  ) as LocalPorts
  for (const name of names) {
    const twin = names.find((other) => other !== name && ports[other] === ports[name])
    if (twin)
      throw new SetUpError(
        `Port ${ports[name]} is given to both ${PORTS[name].words} and ${PORTS[twin].words}.`,
      )
  }
  return ports
}

function portFrom(env: NodeJS.ProcessEnv, port: (typeof PORTS)[PortName]): number {
  const said = env[port.variable]
  if (!said) return port.usual
  const number = Number(said)
  if (!Number.isInteger(number) || number < 1 || number > 65_535)
    throw new SetUpError(`${port.variable} must be a port from 1 to 65535, not "${said}".`)
  return number
}

export async function freePorts(): Promise<LocalPorts> {
  const found = new Set<number>()
  while (found.size < names.length) found.add(await freePort())
  const numbers = [...found]
  return Object.fromEntries(names.map((name, at) => [name, numbers[at]!])) as LocalPorts
}

/** What was just stopped may hold its port a moment longer. */
const PATIENCE_MS = 3_000

/** @throws SetUpError with the sentence for the first port that stays busy */
export async function assertPortsFree(ports: LocalPorts): Promise<void> {
  const until = Date.now() + PATIENCE_MS
  for (const name of names) {
    while (!(await portIsFree(ports[name]))) {
      const { words, variable } = PORTS[name]
      if (Date.now() > until)
        throw new SetUpError(
          `Port ${ports[name]} for ${words} is in use by another program: stop that, or set ${variable} to a free port.`,
        )
      await wait(100)
    }
  }
}
