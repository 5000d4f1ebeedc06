import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { mkdirSync, statSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { join } from 'node:path'
import mysql from 'mysql2/promise'
import { expect, onTestFinished, test } from 'vitest'
import { startLocalMariaDb } from '#db/localMariaDb.ts'
import { localMariaDbPaths } from '#db/localMariaDbFiles.ts'
import { freePort } from '#db/ports.ts'
import { SetUpError } from '#db/SetUpError.ts'
import { temporaryFolder } from './temporaryFolder.ts'

/** A server for one test, with the settings of `npm start`. */
async function start(folder: string, port?: number) {
  const server = await startLocalMariaDb({ folder, ...(port ? { port } : {}) })
  onTestFinished(() => server.stop())
  return server
}

async function ask(url: string, statement: string): Promise<mysql.RowDataPacket[]> {
  const connection = await mysql.createConnection(url)
  try {
    return (await connection.query<mysql.RowDataPacket[]>(statement))[0]
  } finally {
    await connection.end()
  }
}

test('the server is durable, strict, in UTC, in utf8mb4 and on loopback alone', async () => {
  const server = await start(temporaryFolder())
  const [settings] = await ask(
    server.migrateUrl,
    `SELECT @@innodb_flush_log_at_trx_commit AS flush, @@innodb_doublewrite AS doublewrite,
       @@sql_mode AS sqlMode, @@time_zone AS zone, @@character_set_database AS characters,
       @@bind_address AS address, @@skip_name_resolve AS noNames, @@max_allowed_packet AS packet`,
  )
  expect(settings).toMatchObject({
    flush: 1,
    doublewrite: 1,
    sqlMode: expect.stringContaining('STRICT_ALL_TABLES'),
    zone: '+00:00',
    characters: 'utf8mb4',
    address: '127.0.0.1',
    noNames: 1,
    packet: 64 * 1024 * 1024,
  })
})

test('nobody gets in without a password, and the passwords are for their owner alone', async () => {
  const folder = temporaryFolder()
  const server = await start(folder)
  for (const user of ['root', 'breathmark_migrate', 'breathmark_app', ''])
    await expect(
      mysql.createConnection({ host: '127.0.0.1', port: server.port, user }),
      `as "${user}"`,
    ).rejects.toThrow(/denied|not allowed/)
  expect(statSync(join(folder, 'accounts.json')).mode & 0o077).toBe(0)
  expect(statSync(folder).mode & 0o077).toBe(0)
})

test('before migrations the narrow accounts see no table, and none of them may make one', async () => {
  const server = await start(temporaryFolder())
  await ask(server.migrateUrl, 'CREATE TABLE secret (id int primary key)')
  for (const url of [server.appUrl, server.redactUrl])
    await expect(ask(url, 'SELECT * FROM secret')).rejects.toMatchObject({ errno: 1044 })
})

test('a killed server comes back with everything that was committed', async () => {
  const folder = temporaryFolder()
  const server = await start(folder)
  await ask(server.migrateUrl, 'CREATE TABLE kept (id int primary key)')
  await ask(server.migrateUrl, 'INSERT INTO kept VALUES (1), (2)')
  process.kill(server.pid, 'SIGKILL')
  await server.ended
  const again = await start(folder, server.port)
  expect(await ask(again.migrateUrl, 'SELECT id FROM kept')).toEqual([{ id: 1 }, { id: 2 }])
  expect(again.migrateUrl).toBe(server.migrateUrl)
})

test('a busy port is named in one sentence and nothing is started', async () => {
  const other = createServer().listen(0, '127.0.0.1')
  await once(other, 'listening')
  onTestFinished(() => void other.close())
  const { port } = other.address() as { port: number }
  const folder = temporaryFolder()
  await expect(startLocalMariaDb({ folder, port })).rejects.toThrow(
    new SetUpError(`Port ${port} (MariaDB) is in use by another program.`),
  )
})

test('a second start in the same folder is refused while the first one lives', async () => {
  const folder = temporaryFolder()
  const server = await start(folder)
  await expect(startLocalMariaDb({ folder })).rejects.toThrow(/already running from this folder/)
  await expect(ask(server.migrateUrl, 'SELECT 1 AS one')).resolves.toEqual([{ one: 1 }])
})

test('a server that outlived its launcher is stopped in good order and its data are taken over', async () => {
  const folder = temporaryFolder()
  const first = await start(folder)
  await ask(first.migrateUrl, 'CREATE TABLE kept (id int primary key)')
  await first.stop()
  const paths = localMariaDbPaths(folder)
  const port = await freePort()
  const orphan = spawn('/usr/sbin/mariadbd', [
    `--defaults-file=${paths.config}`,
    ...(process.getuid?.() === 0 ? ['--user=root'] : []),
    `--datadir=${paths.data}`,
    `--socket=${paths.socket}`,
    `--pid-file=${paths.pid}`,
    `--port=${port}`,
  ])
  const ended = once(orphan, 'exit')
  const there = Object.assign(new URL(first.migrateUrl), { port }).href
  await expect.poll(() => ask(there, 'SELECT 1 AS one').catch(() => [])).toHaveLength(1)
  // Its launcher, so it says, was another process, which is gone.
  writeFileSync(join(folder, 'launcher.pid'), '999999999')

  const server = await start(folder)
  expect(await ended).toEqual([0, null])
  expect(await ask(server.migrateUrl, 'SHOW TABLES')).toHaveLength(1)
})

test('a long folder name gets its socket elsewhere, short enough for the system', async () => {
  const folder = join(temporaryFolder(), 'a-long-name-of-a-folder'.repeat(6))
  mkdirSync(folder)
  const server = await start(folder)
  expect(Buffer.byteLength(server.socketPath)).toBeLessThanOrEqual(107)
  expect(await ask(server.appUrl, 'SELECT 1 AS one').catch((error) => error.errno)).toBe(1044)
})
