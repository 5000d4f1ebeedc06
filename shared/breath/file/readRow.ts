import { TraceError } from '../TraceError.ts'
import { notANumber } from './notANumber.ts'
import { readNumber } from './readNumber.ts'

const COMMA = 44
const SPACE = 32
const TAB = 9

/**
 * Reads the numbers of the line bytes[from, to) into `row`, whose length is the header's.
 * @throws TraceError at the first cell that is missing, too many or no finite plain decimal
 */
export function readRow(
  bytes: Uint8Array,
  from: number,
  to: number,
  line: number,
  row: Float64Array,
): void {
  const width = row.length
  let start = from
  for (let cell = 0; cell < width; cell++) {
    if (start > to) {
      throw new TraceError(line, cell + 1, `The line has ${cell} cells, the header ${width}.`)
    }
    let end = start
    while (end < to && bytes[end] !== COMMA) end++
    let first = start
    let last = end
    while (first < last && isBlank(bytes[first]!)) first++
    while (last > first && isBlank(bytes[last - 1]!)) last--
    const value = readNumber(bytes, first, last)
    // False for NaN and for both infinities.
    if (!(value - value === 0)) throw notANumber(bytes, first, last, line, cell + 1)
    row[cell] = value
    start = end + 1
  }
  if (start <= to) {
    throw new TraceError(
      line,
      width + 1,
      `The line has more cells than the header (${width}); is a comma used as the decimal sign?`,
    )
  }
}

function isBlank(byte: number): boolean {
  return byte === SPACE || byte === TAB
}
