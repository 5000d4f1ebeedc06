import mysql from 'mysql2/promise'
import { expect, test } from 'vitest'
import { freshDatabase } from '../support/database.ts'

test('a fresh database has the schema, its triggers and the narrow grants, and can be dropped', async () => {
  const database = await freshDatabase()
  const owner = await mysql.createConnection(database.migrateUrl)
  const [triggers] = await owner.query<mysql.RowDataPacket[]>('SHOW TRIGGERS')
  expect(triggers.length).toBeGreaterThan(10)
  await owner.end()

  const app = await mysql.createConnection(database.appUrl)
  await expect(app.query('SELECT count(*) FROM audit_events')).resolves.toBeDefined()
  await expect(app.query('DELETE FROM audit_events')).rejects.toMatchObject({ errno: 1142 })
  await expect(app.query('TRUNCATE TABLE audit_events')).rejects.toMatchObject({ errno: 1142 })
  await expect(app.query('CREATE TABLE intruder (id int)')).rejects.toMatchObject({ errno: 1142 })
  await app.end()

  await database.drop()
  await expect(mysql.createConnection(database.migrateUrl)).rejects.toMatchObject({ errno: 1049 })
})

test('two fresh databases do not see each other', async () => {
  const [one, two] = await Promise.all([freshDatabase(), freshDatabase()])
  const here = await mysql.createConnection(one.migrateUrl)
  await here.query('CREATE TABLE only_here (id int primary key)')
  await here.end()
  const there = await mysql.createConnection(two.migrateUrl)
  await expect(there.query('SELECT * FROM only_here')).rejects.toMatchObject({ errno: 1146 })
  await there.end()
  await Promise.all([one.drop(), two.drop()])
})
