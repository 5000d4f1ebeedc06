import type { Direction } from '#shared/statistics/accuracy/Classes.ts'
import { type RocCurve, rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { type ClassesByOutcome, classesByOutcome } from './classesByOutcome.ts'
import type { Surroundings } from './Quantity.ts'
import type { Table } from './Table.ts'

/** Directions named in a record, one for all markers or one for each. */
export function directionsOf(direction: string): [Direction, Direction] {
  const named = direction.match(/higher|lower/g) as Direction[] | null
  const first = named?.[0] ?? 'higher'
  return [first, named?.[1] ?? first]
}

export function classesOf({ record, table }: Surroundings): ClassesByOutcome {
  return classesIn(table(record.dataset), record.marker, directionsOf(record.direction)[0])
}

export function classesIn(table: Table, marker: string, direction: Direction): ClassesByOutcome {
  return classesByOutcome(table.numbers(marker), table.outcomes(), direction)
}

export function curveOf(surroundings: Surroundings): RocCurve {
  return rocCurve(classesOf(surroundings))
}

/** The rows in which the outcome and every named column are known. */
export function completeRows(table: Table, columns: string[]): Table {
  const outcomes = table.outcomes()
  const numbers = columns.map((column) => table.numbers(column))
  const complete = new Set(
    table.rows.filter(
      (_, i) => outcomes[i] !== null && numbers.every((values) => values[i] !== null),
    ),
  )
  return table.where((row) => complete.has(row))
}
