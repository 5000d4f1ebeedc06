import { randomBytes } from 'node:crypto'
import { connect } from 'node:net'
import { text } from 'node:stream/consumers'
import mysql from 'mysql2/promise'
import { inject } from 'vitest'
import type { LocalMariaDb } from '#db/localMariaDb.ts'
import { migrate } from '#db/migrate.ts'

export type FreshDatabase = {
  appUrl: string
  migrateUrl: string
  redactUrl: string
  drop: () => Promise<void>
}

/**
 * An empty database of one's own on this run's server, with every migration (so with tables,
 * triggers and grants) applied as for a hospital: about a quarter of a second.
 */
export async function freshDatabase(): Promise<FreshDatabase> {
  const server = await databaseServer()
  const name = `breathmark${randomBytes(8).toString('hex')}`
  const here = (url: string) => Object.assign(new URL(url), { pathname: `/${name}` }).href
  const asOwner = async (statement: string) => {
    const connection = await mysql.createConnection(server.migrateUrl)
    await connection.query(statement).finally(() => connection.end())
  }
  await asOwner(`CREATE DATABASE \`${name}\``)
  await migrate(here(server.migrateUrl))
  return {
    appUrl: here(server.appUrl),
    migrateUrl: here(server.migrateUrl),
    redactUrl: here(server.redactUrl),
    drop: () => asOwner(`DROP DATABASE \`${name}\``),
  }
}

async function databaseServer(): Promise<LocalMariaDb> {
  const answer = JSON.parse(await text(connect(inject('databaseServer'))))
  if (answer.fault) throw new Error(answer.fault)
  return answer
}
