import type { InstrumentData } from '../settings/InstrumentData.ts'
import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { Recording, TraceColumns } from '../TraceColumns.ts'
import { TraceError } from '../TraceError.ts'
import type { TakeBlock } from './forEachBlock.ts'
import { type HeaderCell, readHeader } from './readHeader.ts'
import { type KeyLine, readKeyLine } from './readKeyLine.ts'
import { refuseUtf16 } from './refuseUtf16.ts'
import { type RowKeeper, rowKeeper } from './rowKeeper.ts'
import { withoutByteOrderMark } from './withoutByteOrderMark.ts'

const NEWLINE = 10
const RETURN = 13
const HASH = 35
const SPACE = 32
const TAB = 9

type GasLine = Extract<KeyLine, { about: 'gas' }> & { line: number }

/** Takes a file's blocks of lines in their order; `finish` gives its columns. */
export function columnsTaker(settings: TraceSettings): {
  take: TakeBlock
  /** The line that comes next, from 1. */
  line: () => number
  finish: () => TraceColumns
} {
  const recording: Recording = { instrumentSerial: null, startedAt: null, firmware: null }
  const gasLines: GasLine[] = []
  let header: { line: number; cells: HeaderCell[] } | null = null
  let rows: RowKeeper | null = null
  let blankLine = 0
  let line = 1

  const takeKeyLine = (key: KeyLine) => {
    if (key.about === 'recording') {
      if (recording[key.key] !== null) throw new TraceError(line, 1, 'This key is there twice.')
      recording[key.key] = key.value
      return
    }
    if (gasLines.some((other) => other.gas === key.gas && other.key === key.key)) {
      throw new TraceError(line, 1, 'This key is there twice.')
    }
    gasLines.push({ ...key, line })
    if (header) requireGas(header.cells, key.gas, line)
  }

  const takeHeader = (bytes: Uint8Array, from: number, to: number) => {
    const cells = readHeader(bytes, from, to, line)
    for (const each of gasLines) requireGas(cells, each.gas, each.line)
    header = { line, cells }
    rows = rowKeeper(cells, settings)
  }

  /** Takes bytes[from, to): one line without its end. */
  const takeLine = (bytes: Uint8Array, from: number, to: number) => {
    let start = from
    if (line === 1) {
      refuseUtf16(bytes, from, to)
      start = withoutByteOrderMark(bytes, from, to)
    }
    if (isBlankLine(bytes, start, to)) {
      blankLine ||= line
      return
    }
    if (blankLine) throw new TraceError(blankLine, 1, 'The line is empty.')
    if (bytes[start] === HASH) {
      if (rows && rows.count() > 0) {
        throw new TraceError(line, 1, 'Lines that start with # stand before the numbers.')
      }
      takeKeyLine(readKeyLine(bytes, start, to, line))
    } else if (rows) rows.keep(bytes, start, to, line)
    else takeHeader(bytes, start, to)
  }

  const take: TakeBlock = (bytes, from, to) => {
    let start = from
    while (start < to) {
      // A line in the middle of blank ones is refused with care.
      const next = rows && !blankLine ? rows.keepPlain(bytes, start, to, line) : null
      if (next) {
        start = next.start
        line = next.line
        if (start >= to) break
      }
      const end = bytes.indexOf(NEWLINE, start)
      const isWhole = end >= 0 && end < to
      takeLine(bytes, start, isWhole ? withoutReturn(bytes, start, end) : to)
      start = isWhole ? end + 1 : to
      line++
    }
  }

  const finish = (): TraceColumns => {
    if (!header || !rows) throw new TraceError(Math.max(line - 1, 1), 1, 'The file has no header.')
    return {
      recording,
      headerLine: header.line,
      ...rows.columns((gas) => instrumentOf(gas, gasLines)),
    }
  }
  return { take, line: () => line, finish }
}

function requireGas(cells: HeaderCell[], gas: string, line: number): void {
  if (cells.some((cell) => cell.gas === gas)) return
  throw new TraceError(line, 1, 'The key names a gas that has no column in this file.')
}

function instrumentOf(gas: string, lines: GasLine[]): Partial<InstrumentData> {
  return Object.fromEntries(
    lines.filter((each) => each.gas === gas).map(({ key, value }) => [key, value]),
  )
}

function withoutReturn(bytes: Uint8Array, from: number, to: number): number {
  return to > from && bytes[to - 1] === RETURN ? to - 1 : to
}

function isBlankLine(bytes: Uint8Array, from: number, to: number): boolean {
  for (let at = from; at < to; at++) {
    if (bytes[at] !== SPACE && bytes[at] !== TAB) return false
  }
  return true
}
