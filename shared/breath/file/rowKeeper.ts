import type { InstrumentData } from '../settings/InstrumentData.ts'
import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { TraceColumns } from '../TraceColumns.ts'
import { TraceError } from '../TraceError.ts'
import type { HeaderCell, Quantity } from './readHeader.ts'
import { readPlainRow } from './readPlainRow.ts'
import { readRow } from './readRow.ts'

const NEWLINE = 10
const FIRST_CAPACITY = 1024

type KeptColumns = Omit<TraceColumns, 'recording' | 'headerLine'>

/** Keeps the numbers of the data lines it is given. */
export type RowKeeper = {
  /** Takes the line bytes[from, to), without its end. */
  keep: (bytes: Uint8Array, from: number, to: number, line: number) => void
  /**
   * Takes lines of bytes[from, to) as long as they are plain short decimals, and says where and with
   * which line it stopped.
   */
  keepPlain: (
    bytes: Uint8Array,
    from: number,
    to: number,
    line: number,
  ) => { start: number; line: number }
  count: () => number
  columns: (instrumentOf: (gas: string) => Partial<InstrumentData>) => KeptColumns
}

/**
 * Keeps rows as one growing array per column; a full array is copied into one twice as long.
 * Both ways of keeping refuse what is wrong in a row by itself: its cells, a clock that does not advance, CO2 that
 * cannot be.
 */
export function rowKeeper(cells: HeaderCell[], settings: TraceSettings): RowKeeper {
  const width = cells.length
  const row = new Float64Array(width)
  const factors = Float64Array.from(cells, ({ factor }) => factor)
  const timeCell = cells.findIndex(({ quantity }) => quantity === 'timeS')
  const co2Cell = cells.findIndex(({ quantity }) => quantity === 'co2Percent')
  const { lowestCo2Percent, largestCo2MaximumPercent, mostSamples } = settings
  const kept = cells.map(() => new Float64Array(FIRST_CAPACITY))
  let capacity = FIRST_CAPACITY
  let count = 0
  let firstLine = 0
  let lastTime = Number.NEGATIVE_INFINITY

  const keepRow = (line: number) => {
    const time = row[timeCell]!
    const co2 = row[co2Cell]!
    if (time <= lastTime) {
      throw new TraceError(line, timeCell + 1, 'The time does not lie after the one before.')
    }
    if (co2 < lowestCo2Percent) {
      throw new TraceError(line, co2Cell + 1, `CO2 is below ${lowestCo2Percent} %.`)
    }
    if (co2 > largestCo2MaximumPercent) {
      throw new TraceError(
        line,
        co2Cell + 1,
        `CO2 is above ${largestCo2MaximumPercent} %; is it given in mmHg?`,
      )
    }
    if (count >= mostSamples) {
      throw new TraceError(line, 1, `The file has more than ${mostSamples} samples.`)
    }
    if (count === 0) firstLine = line
    if (count === capacity) {
      capacity *= 2
      // One after the other: each old array may go before the next is copied.
      for (let cell = 0; cell < width; cell++) kept[cell] = grown(kept[cell]!, capacity)
    }
    for (let cell = 0; cell < width; cell++) kept[cell]![count] = row[cell]! * factors[cell]!
    lastTime = time
    count++
  }

  const keep: RowKeeper['keep'] = (bytes, from, to, line) => {
    readRow(bytes, from, to, line, row)
    keepRow(line)
  }

  const keepPlain: RowKeeper['keepPlain'] = (bytes, from, to, firstOfThem) => {
    let start = from
    let line = firstOfThem
    // Only the file's last line may lack its line feed: then nothing would stop the quick way.
    if (bytes[to - 1] !== NEWLINE) return { start, line }
    while (start < to) {
      const next = readPlainRow(bytes, start, row)
      if (next < 0) break
      keepRow(line)
      start = next
      line++
    }
    return { start, line }
  }

  const columns: RowKeeper['columns'] = (instrumentOf) => {
    const at = (cell: number) => kept[cell]!.subarray(0, count)
    const optional = (wanted: Quantity) => {
      const cell = cells.findIndex(({ quantity }) => quantity === wanted)
      return cell < 0 ? null : at(cell)
    }
    return {
      firstLine,
      timeColumn: timeCell + 1,
      co2Column: co2Cell + 1,
      timeS: at(timeCell),
      co2Percent: at(co2Cell),
      flowMlS: optional('flowMlS'),
      pressureCmH2o: optional('pressureCmH2o'),
      temperatureC: optional('temperatureC'),
      humidityPercent: optional('humidityPercent'),
      gases: cells.flatMap(({ gas }, cell) =>
        gas === null
          ? []
          : [{ analyte: gas, column: cell + 1, ppb: at(cell), instrument: instrumentOf(gas) }],
      ),
    }
  }
  return { keep, keepPlain, count: () => count, columns }
}

function grown(column: Float64Array<ArrayBuffer>, capacity: number): Float64Array<ArrayBuffer> {
  const larger = new Float64Array(capacity)
  larger.set(column)
  return larger
}
