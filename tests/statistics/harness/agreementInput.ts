import type { ReplicatesByMethod } from '#shared/statistics/agreement/replicateLimitsConstant.ts'
import { completePairs } from './completePairs.ts'
import type { Surroundings } from './Quantity.ts'
import type { Table } from './Table.ts'

/** "a - b" → the two columns. */
export function pairColumns(marker: string): [string, string] {
  return marker.split(' - ') as [string, string]
}

/** Pair statistics of a table with several replicates a subject use the first. */
export function pairTable({ record, table }: Surroundings): Table {
  const whole = table(record.dataset)
  if (!whole.has('replicate')) return whole
  return whole.where((row) => Number(row.replicate) === 1)
}

export function pairsOf(s: Surroundings): { first: Float64Array; second: Float64Array } {
  const [a, b] = pairColumns(s.record.marker)
  const table = pairTable(s)
  const { first, second } = completePairs(table.numbers(a), table.numbers(b))
  return { first, second }
}

/** The columns x and y of a regression, complete pairs. */
export function xyOf(s: Surroundings): { x: Float64Array; y: Float64Array } {
  const table = pairTable(s)
  const { first, second } = completePairs(
    table.numbers(String(s.given.x)),
    table.numbers(String(s.given.y)),
  )
  return { x: first, y: second }
}

/** Each subject's readings by one method, missing ones as null, in the order of the replicates. */
function readings(table: Table, method: string): (number | null)[][] {
  const wide = /^(.+) \(([\d, ]+)\)$/.exec(method)
  if (wide) {
    const columns = wide[2]!.split(',').map((k) => table.numbers(`${wide[1]}_${k.trim()}`))
    return table.rows.map((_, i) => columns.map((column) => column[i]!))
  }
  const values = table.numbers(method)
  const bySubject = new Map<string, (number | null)[]>()
  table.texts('subject').forEach((subject, i) => {
    const list = bySubject.get(subject) ?? []
    list.push(values[i]!)
    bySubject.set(subject, list)
  })
  return [...bySubject.values()]
}

function known(values: (number | null)[]): number[] {
  return values.filter((value) => value !== null)
}

/** Replicates of one method by subject; a marker "m (1,2)" stands for the columns m_1 and m_2. */
export function replicatesOf({ record, table }: Surroundings): number[][] {
  return readings(table(record.dataset), record.marker)
    .map(known)
    .filter((values) => values.length > 0)
}

/** Complete pairs of replicates by subject. */
export function replicatePairsOf({ record, table }: Surroundings): ReplicatesByMethod[] {
  const [a, b] = pairColumns(record.marker)
  const first = readings(table(record.dataset), a)
  const second = readings(table(record.dataset), b)
  return first
    .map((values, i) => completePairs(values, second[i]!))
    .filter((pairs) => pairs.first.length > 0)
}

/** Replicates of the two methods by subject, each with all its own readings. */
export function replicatesByMethodOf({ record, table }: Surroundings): ReplicatesByMethod[] {
  const [a, b] = pairColumns(record.marker)
  const first = readings(table(record.dataset), a).map(known)
  const second = readings(table(record.dataset), b).map(known)
  return first
    .map((values, i) => ({ first: values, second: second[i]! }))
    .filter((subject) => subject.first.length > 0 && subject.second.length > 0)
}
