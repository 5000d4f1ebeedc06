import { join } from 'node:path'
import { SetUpError } from '#db/SetUpError.ts'
import { portsFrom } from './localPorts.ts'
import { startStack } from './stack.ts'

/** `npm start`: everything on this machine, until a signal says stop. */
const stopping = new AbortController()
const stopped = new Promise<void>((resolve) => {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const)
    process.on(signal, () => {
      // Ctrl-C comes from the terminal and once more from npm.
      if (!stopping.signal.aborted) console.log('\nStopping …')
      stopping.abort()
      resolve()
    })
})

/** What the API reads beside what the stack decides. */
const passedOn = Object.fromEntries(
  Object.entries(process.env).filter(([name]) => name.startsWith('BREATHMARK_')),
) as Record<string, string>

try {
  console.log('Starting Breathmark')
  const stack = await startStack({
    folder: join(import.meta.dirname, '../../.local'),
    ports: portsFrom(process.env),
    client: 'sources',
    demoData: true,
    forTests: false,
    env: passedOn,
    signal: stopping.signal,
    say: (line) => console.log(line),
  })
  const accounts = stack.people.map((person) => person.subject).join(', ')
  console.log(
    `\nBreathmark is running at ${stack.publicUrl} – demo accounts, no password: ${accounts}`,
  )
  console.log(`Its mail is caught at ${stack.mailPageUrl}. Ctrl-C stops everything.`)
  const end = await Promise.race([stack.broken, stopped])
  if (end) console.error(end)
  await stack.stop()
  console.log('Everything has stopped; the data are kept.')
  process.exitCode = end ? 1 : 0
} catch (error) {
  console.error(error instanceof SetUpError ? error.message : error)
  process.exitCode = stopping.signal.aborted ? 0 : 1
}
