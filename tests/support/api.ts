import { randomBytes, randomUUID } from 'node:crypto'
import { asc, eq, sql } from 'drizzle-orm'
import { drizzle } from 'drizzle-orm/mysql2'
import type { Express } from 'express'
import mysql from 'mysql2/promise'
import request, { type Test } from 'supertest'
import { connectDatabase, type Database, disconnectDatabase } from '#db/client.ts'
import { auditEvents } from '#db/schema/auditEvents.ts'
import { logins } from '#db/schema/logins.ts'
import { people } from '#db/schema/people.ts'
import { createApp } from '#server/app.ts'
import { readConfig, setConfig } from '#server/config.ts'
import { JOB_HANDLERS } from '#server/jobHandlers.ts'
import { runNextJob } from '#server/jobs/runner.ts'
import { freshDatabase } from './database.ts'
import { makers } from './makers.ts'

export type TestPerson = { id: string; name: string; secret: string }

/** A signed-in browser without the browser: sends the login's cookie and what our own pages send. */
export type Client = Record<'get' | 'post' | 'put' | 'patch' | 'delete', (path: string) => Test>

/**
 * The real application on a database of its own. The fixtures write with the migration account, as
 * a hospital's database would have been filled before; everything under test goes through HTTP.
 */
export async function startApi(environment: Record<string, string> = {}) {
  const database = await freshDatabase()
  setConfig(
    readConfig({
      NODE_ENV: 'test',
      BREATHMARK_PUBLIC_URL: 'http://127.0.0.1:4173',
      BREATHMARK_DATABASE_URL: database.appUrl,
      BREATHMARK_OIDC_ISSUER: 'http://127.0.0.1:9',
      BREATHMARK_OIDC_CLIENT_ID: 'breathmark',
      BREATHMARK_OIDC_CLIENT_SECRET: 'not-used-in-these-tests',
      BREATHMARK_SMTP_URL: 'smtp://127.0.0.1:9',
      BREATHMARK_MAIL_FROM: 'breathmark@hospital.example',
      BREATHMARK_SECRET: randomBytes(32).toString('hex'),
      BREATHMARK_REQUESTS_PER_MINUTE: '999999',
      ...environment,
    }),
  )
  connectDatabase(database.appUrl)
  const pool = mysql.createPool({ uri: database.migrateUrl, timezone: 'Z', connectionLimit: 4 })
  const fixtures: Database = drizzle(pool, { mode: 'planetscale' })
  const app = createApp()
  return {
    app,
    urls: database,
    /** The owner's database: to fill and to look behind the API. */
    fixtures,
    given: makers(fixtures),
    as: (person: TestPerson): Client => client(app, person),
    nobody: client(app, null),
    /** Works off the job queue as the worker thread would. */
    runJobs: async () => {
      while (await runNextJob(JOB_HANDLERS));
    },
    /** Makes every login older by so many minutes in one respect. */
    age: (column: 'lastSeenAt' | 'endsAt', minutes: number) =>
      fixtures
        .update(logins)
        .set({ [column]: sql`${logins[column]} - interval ${sql.raw(String(minutes))} minute` }),
    /** What the hospital's administration does when somebody leaves. */
    disable: (name: string) =>
      fixtures.update(people).set({ disabled: true }).where(eq(people.name, name)),
    auditEvents: (chainId: string) =>
      fixtures
        .select()
        .from(auditEvents)
        .where(eq(auditEvents.chainId, chainId))
        .orderBy(asc(auditEvents.position)),
    stop: async () => {
      await disconnectDatabase()
      await pool.end()
      await database.drop()
    },
  }
}

export type Api = Awaited<ReturnType<typeof startApi>>

function client(app: Express, person: TestPerson | null): Client {
  const send = (method: keyof Client) => (path: string) => {
    const test = request(app)
      [method](path)
      .set('x-breathmark', '1')
      .set('x-breathmark-offset', '+01:00')
    return person ? test.set('cookie', `breathmark-login=${person.secret}`) : test
  }
  return {
    get: send('get'),
    post: send('post'),
    put: send('put'),
    patch: send('patch'),
    delete: send('delete'),
  }
}

/** A key for a record that the test makes. */
export const aKey = (): string => randomUUID()
