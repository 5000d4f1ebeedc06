import { freePorts } from '#server/local/localPorts.ts'
import { startStack } from '#server/local/stack.ts'

/**
 * A launcher such as `npm start` is, in a folder and on ports of its own: the test that runs it
 * kills it in more ways than one.
 */
const folder = process.argv[2]
if (!folder) throw new Error('Say in which folder.')
const stopping = new AbortController()
const stopped = new Promise<void>((resolve) => {
  process.once('SIGTERM', () => {
    stopping.abort()
    resolve()
  })
})
const ports = await freePorts()
const stack = await startStack({
  folder,
  ports,
  client: 'sources',
  demoData: false,
  forTests: true,
  env: {},
  signal: stopping.signal,
  say: (line) => console.log(line),
})
process.send?.({ publicUrl: stack.publicUrl, ports })
const fault = await Promise.race([stack.broken, stopped])
if (fault) console.error(fault)
process.exitCode = fault ? 1 : 0
await stack.stop()
process.disconnect?.()
