import { readFileSync } from 'node:fs'
import { createServer as createHttpServer } from 'node:http'
import { createServer as createHttpsServer } from 'node:https'
import { Worker } from 'node:worker_threads'
import { connectDatabase, disconnectDatabase } from '#db/client.ts'
import { createApp } from './app.ts'
import { readConfig, setConfig } from './config.ts'

const config = setConfig(readConfig(process.env))
connectDatabase(config.BREATHMARK_DATABASE_URL)

const app = createApp()
const server =
  config.BREATHMARK_TLS_CERT && config.BREATHMARK_TLS_KEY
    ? createHttpsServer(
        {
          cert: readFileSync(config.BREATHMARK_TLS_CERT),
          key: readFileSync(config.BREATHMARK_TLS_KEY),
        },
        app,
      )
    : createHttpServer(app)

const threads = Array.from({ length: config.BREATHMARK_JOB_THREADS }, startThread)
server.listen(config.BREATHMARK_PORT, config.BREATHMARK_HOST, () => {
  console.log(JSON.stringify({ level: 'info', event: 'listening', port: config.BREATHMARK_PORT }))
  // A parent process waits for this word.
  process.send?.('listening')
})

for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => void stop())

/** Takes no new requests, lets those under way and the jobs under way end, then leaves. */
async function stop(): Promise<void> {
  await new Promise((resolve) => {
    server.close(resolve)
    server.closeIdleConnections()
  })
  await Promise.all(
    threads.map((thread) => {
      thread.postMessage('stop')
      return new Promise((resolve) => thread.once('exit', resolve))
    }),
  )
  await disconnectDatabase()
  process.exit(0)
}

/** Long work and mail run in threads, so that nobody's work waits for another's: TypeScript in development, the bundle beside this one in production. */
function startThread(): Worker {
  const bundled = import.meta.url.endsWith('.js')
  const worker = bundled
    ? new Worker(new URL('./thread.js', import.meta.url))
    : new Worker(
        // On Node 20 a thread does not take tsx over from the process, nor by its arguments.
        `import { register } from 'tsx/esm/api'
         register()
         await import(${JSON.stringify(new URL('./jobs/thread.ts', import.meta.url).href)})`,
        { eval: true },
      )
  worker.on('error', (error) => {
    console.error(
      JSON.stringify({ level: 'error', event: 'thread.failed', fault: String(error.stack) }),
    )
    process.exit(1)
  })
  return worker
}
