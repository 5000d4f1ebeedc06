import { readNumber } from '../../forms/readNumber.ts'
import { type CsvRow, cellProblem, linesOf, numberedRows, type Refusal } from './csvTable.ts'

/** Refused cells that are named; a file of another kind would refuse every one. */
const MOST_NAMED = 100

export type Series = { readings: Float64Array; refused: Refusal[]; refusedCount: number }

/**
 * Takes one column out of rows as they come, piece by piece, so that a long series never stands in
 * memory as text.
 */
export function seriesReader(column: string) {
  let line = 1
  let place: number | null = null
  let readings = new Float64Array(1 << 14)
  let count = 0
  let refusedCount = 0
  const refused: Refusal[] = []

  const refuse = (row: CsvRow, why: string) => {
    refusedCount += 1
    if (refused.length < MOST_NAMED) refused.push({ line: row.line, column, why })
  }
  const push = (value: number) => {
    if (count === readings.length) {
      const wider = new Float64Array(2 * count)
      wider.set(readings)
      readings = wider
    }
    readings[count++] = value
  }
  return {
    take(data: readonly (readonly string[])[]) {
      for (const row of numberedRows(data, line)) {
        if (place === null) {
          place = row.cells.findIndex((cell) => cell.trim() === column)
          continue
        }
        const why = cellProblem(row.cells[place])
        if (why === null) push(readNumber(row.cells[place]!).value!)
        else refuse(row, why)
      }
      for (const cells of data) line += linesOf(cells)
    },
    series: (): Series => ({ readings: readings.slice(0, count), refused, refusedCount }),
  }
}
