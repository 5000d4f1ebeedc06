import { parentPort } from 'node:worker_threads'
import { connectDatabase, disconnectDatabase } from '#db/client.ts'
import { readConfig, setConfig } from '#server/config.ts'
import { JOB_HANDLERS } from '#server/jobHandlers.ts'
import { sendMails } from '#server/mail/sender.ts'
import { workOnJobs } from './runner.ts'

/** A thread of its own for long work and mail, so that requests never wait for either. */
const stop = new AbortController()
parentPort?.on('message', () => stop.abort())

const config = setConfig(readConfig(process.env))
connectDatabase(config.BREATHMARK_DATABASE_URL, 4)
await Promise.all([workOnJobs(JOB_HANDLERS, stop.signal), sendMails(stop.signal)])
await disconnectDatabase()
parentPort?.close()
