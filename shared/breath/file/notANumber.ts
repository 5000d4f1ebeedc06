import { TraceError } from '../TraceError.ts'
import { decodeText } from './decodeText.ts'

/** Why a cell is no number; the cell itself is never quoted. */
export function notANumber(
  bytes: Uint8Array,
  from: number,
  to: number,
  line: number,
  column: number,
): TraceError {
  const cell = decodeText(bytes, from, to, line, column).trim()
  return new TraceError(line, column, reasonOf(cell))
}

function reasonOf(cell: string): string {
  if (cell === '') return 'The cell is empty.'
  if (cell.includes('"')) return 'The cell is quoted; numbers stand without quotation marks.'
  if (cell.includes(';')) return 'Cells are separated by semicolons; separate them by commas.'
  if (cell.includes('\t')) return 'Cells are separated by tabs; separate them by commas.'
  if (/^[+-]?\d/.test(cell) && Number.isFinite(Number.parseFloat(cell)) === false) {
    return 'The number is too large.'
  }
  return 'This is no plain decimal number; write one with a point, such as 4.2 or 1.5e3.'
}
