import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { ReferenceRecord } from './ReferenceRecord.ts'
import { Table } from './Table.ts'

/** A folder of references: its records, and its tables read when first asked for. */
export type ReferenceFolder = {
  records: { file: string; record: ReferenceRecord }[]
  table: (name: string) => Table
  tables: string[]
}

export function readFolder(folder: string): ReferenceFolder {
  const namesIn = (part: string, ending: string) =>
    readdirSync(join(folder, part))
      .filter((name) => name.endsWith(ending))
      .sort()
  const read = new Map<string, Table>()
  return {
    records: namesIn('results', '.json').flatMap((file) => {
      const text = readFileSync(join(folder, 'results', file), 'utf8')
      const { records } = JSON.parse(text) as { records: ReferenceRecord[] }
      return records.map((record) => ({ file, record }))
    }),
    tables: namesIn('data', '.csv').map((name) => name.slice(0, -4)),
    table: (name) => {
      const known = read.get(name)
      if (known) return known
      const fresh = Table.parse(readFileSync(join(folder, 'data', `${name}.csv`), 'utf8'))
      read.set(name, fresh)
      return fresh
    },
  }
}
