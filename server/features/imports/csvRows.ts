import { Readable } from 'node:stream'
import Papa from 'papaparse'
import type { Delimiter } from '#shared/schemas/import.ts'
import { isBlankRow, isTooLong } from './csvHead.ts'
import { MOST_CELL_CHARACTERS, MOST_ROWS } from './importLimits.ts'
import { refuseFile } from './uploadedFile.ts'

/** A row of the file: the line where it begins (the headings are line 1) and its trimmed cells. */
export type CsvRow = { line: number; cells: string[] }

/**
 * Reads a file piece by piece, so that its text is never in memory as a whole.
 * @param pieces UTF-8 bytes in order, cut anywhere
 * @returns the rows below the headings; blank lines are left out but counted as lines
 * @throws AppError unreadable-file when quotation marks do not pair up, or it has too many rows
 */
export async function readCsvRows(
  pieces: AsyncIterable<Uint8Array>,
  delimiter: Delimiter,
): Promise<CsvRow[]> {
  const rows: CsvRow[] = []
  let line = 1
  let headings = true
  const take = (cells: string[]) => {
    const begins = line
    line += 1
    for (const cell of cells) if (cell.includes('\n')) line += cell.split('\n').length - 1
    if (cells.some(isTooLong))
      refuseFile(
        `Line ${begins} has a cell of more than ${MOST_CELL_CHARACTERS.toLocaleString('en-GB')} characters.`,
      )
    const trimmed = cells.map((cell) => cell.trim())
    if (isBlankRow(trimmed)) return
    if (headings) {
      headings = false
      return
    }
    if (rows.length === MOST_ROWS)
      refuseFile(
        `The file has more than ${MOST_ROWS.toLocaleString('en-GB')} rows. Split it into several files.`,
      )
    rows.push({ line: begins, cells: trimmed })
  }
  await new Promise<void>((resolve, reject) => {
    const input = Readable.from(plainText(pieces))
    // What goes wrong inside the parser's callbacks must end the reading, not the process.
    const fail = (error: unknown) => {
      input.destroy()
      reject(error)
    }
    let failed = false
    Papa.parse<string[]>(input, {
      delimiter,
      newline: '\n',
      chunk: ({ data, errors }, parser) => {
        if (failed) return
        try {
          const broken = errors.find((error) => error.type === 'Quotes')
          // Rows before the broken one are read, so that its line is known.
          for (const cells of broken ? data.slice(0, broken.row) : data) take(cells)
          if (broken)
            refuseFile(
              `Line ${line}: quotation marks are not closed, or stand in the middle of a cell.`,
            )
        } catch (error) {
          failed = true
          // Aborting calls complete(), so the refusal has to come first.
          fail(error)
          parser.abort()
        }
      },
      complete: () => resolve(),
      error: fail,
    })
  })
  return rows
}

/** Decodes the pieces and gives every line the same end. */
async function* plainText(pieces: AsyncIterable<Uint8Array>): AsyncGenerator<string> {
  const decoder = new TextDecoder('utf-8', { fatal: true })
  let heldReturn = ''
  for await (const piece of pieces) {
    const text = heldReturn + decoder.decode(piece, { stream: true })
    // A carriage return at the end may have its line feed in the next piece.
    heldReturn = text.endsWith('\r') ? '\r' : ''
    yield text.slice(0, text.length - heldReturn.length).replace(/\r\n?/g, '\n')
  }
  yield (heldReturn + decoder.decode()).replace(/\r\n?/g, '\n')
}
