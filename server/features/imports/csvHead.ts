import Papa from 'papaparse'
import { DELIMITERS, type Delimiter } from '#shared/schemas/import.ts'
import { MOST_CELL_CHARACTERS, MOST_COLUMNS, MOST_HEADING_CHARACTERS } from './importLimits.ts'
import { refuseFile } from './uploadedFile.ts'

/** Headings and first rows of a file; cells trimmed, blank lines left out. */
export type CsvHead = { headings: string[]; rows: string[][]; wholeFile: boolean }

const MOST_ROWS_READ = 20_000
const ROWS_TO_JUDGE_BY = 50

/** One kind of line end; a byte order mark and blanks around the text are nothing. */
export const plainLines = (text: string): string =>
  text.replace(/^\uFEFF/, '').replace(/\r\n?/g, '\n')

export const isBlankRow = (cells: readonly string[]): boolean => cells.every((cell) => cell === '')

/**
 * Reads the beginning of a file.
 * @param piece the first bytes; @param wholeFile whether they are all of it
 * @throws AppError unreadable-file when there are no headings, or what stands there is no table
 */
export function readCsvHead(piece: Buffer, wholeFile: boolean, delimiter: Delimiter): CsvHead {
  const text = wholeLines(plainLines(piece.toString('utf8')), wholeFile)
  const parsed = Papa.parse<string[]>(text, {
    delimiter,
    newline: '\n',
    preview: MOST_ROWS_READ + 1,
  })
  const [headings, ...rows] = parsed.data
    .map((cells) => cells.map((cell) => cell.trim()))
    .filter((cells) => !isBlankRow(cells))
  if (!headings) refuseFile('The file holds nothing but blank lines.')
  requireHeadings(headings)
  const broken = parsed.errors.find(
    (error) => error.type === 'Quotes' && (wholeFile || error.code !== 'MissingQuotes'),
  )
  if (broken)
    refuseFile(
      'Quotation marks are not closed, or stand in the middle of a cell. Save the file anew as CSV.',
    )
  if (rows.length === 0) refuseFile('The file holds headings and no rows.')
  return { headings, rows, wholeFile: wholeFile && rows.length < MOST_ROWS_READ }
}

/** A piece may end in the middle of a line, and of a character. */
function wholeLines(text: string, wholeFile: boolean): string {
  if (wholeFile) return text
  const end = text.lastIndexOf('\n')
  if (end < 0) refuseFile('The first line is too long to hold headings. Is this a table?')
  return text.slice(0, end)
}

function requireHeadings(headings: readonly string[]): void {
  if (headings.length > MOST_COLUMNS)
    refuseFile(
      `The file has ${headings.length.toLocaleString('en-GB')} columns; at most ${MOST_COLUMNS} can be read.`,
    )
  if (headings.length < 2)
    refuseFile('The file has one column only. Commas, semicolons or tabs part the cells of a CSV.')
  headings.forEach((heading, index) => {
    const column = `Column ${index + 1}`
    if (heading === '') refuseFile(`${column} has no heading. The first line must hold headings.`)
    if (heading.length > MOST_HEADING_CHARACTERS)
      refuseFile(`${column} has a heading of more than ${MOST_HEADING_CHARACTERS} characters.`)
    if (/\p{Cc}/u.test(heading)) refuseFile(`${column} has a heading with control characters.`)
    if (/^[-+]?[\d.,\s/:-]+$/.test(heading))
      refuseFile(
        `${column} is headed by a number. The first line must hold headings, so add them and choose the file again.`,
      )
    if (headings.indexOf(heading) !== index)
      refuseFile(`Columns ${headings.indexOf(heading) + 1} and ${index + 1} have the same heading.`)
  })
}

/** The delimiter under which the first rows have the same number of cells, and more than one. */
export function proposeDelimiter(piece: Buffer): Delimiter {
  const text = plainLines(piece.subarray(0, 200_000).toString('utf8'))
  let best: { delimiter: Delimiter; fit: number } = { delimiter: ',', fit: 0 }
  for (const delimiter of DELIMITERS) {
    const { data } = Papa.parse<string[]>(text, {
      delimiter,
      newline: '\n',
      preview: ROWS_TO_JUDGE_BY,
    })
    const rows = data.filter((cells) => cells.length > 1 || cells[0]?.trim() !== '')
    const width = rows[0]?.length ?? 0
    if (width < 2) continue
    const alike = rows.filter((cells) => cells.length === width).length / rows.length
    // Most rows alike first; among equals the one that finds more columns.
    const fit = alike + Math.min(width, MOST_COLUMNS) / (MOST_COLUMNS * 10)
    if (fit > best.fit) best = { delimiter, fit }
  }
  return best.delimiter
}

/** A quoted monster is no cell. */
export const isTooLong = (cell: string): boolean => cell.length > MOST_CELL_CHARACTERS
