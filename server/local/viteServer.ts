import { createServer } from 'vite'

/** The client from its sources, with the proxy to the API that vite.config.ts describes. */
const server = await createServer({ server: { port: Number(process.env.BREATHMARK_CLIENT_PORT) } })
await server.listen()
for (const signal of ['SIGINT', 'SIGTERM'] as const)
  process.once(signal, () => void server.close().then(() => process.exit(0)))
process.send?.('listening')
