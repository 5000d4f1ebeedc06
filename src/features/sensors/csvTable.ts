import Papa from 'papaparse'
import { readNumber } from '../../forms/readNumber.ts'

export type CsvRow = {
  /** Counted from 1, the heading's line included, so that an editor shows the same number. */
  line: number
  cells: readonly string[]
}

export type CsvTable = { headings: readonly string[]; rows: readonly CsvRow[] }

/** A cell that is not what it should be: where, and why. */
export type Refusal = { line: number; column: string; why: string }

/**
 * Reads text with one line of headings; lines that are blank or begin with # are passed over. Comma,
 * semicolon or tab between cells is found out from the text.
 */
export function readCsv(text: string): { table: CsvTable } | { problem: string } {
  const rows = numberedRows(
    Papa.parse<string[]>(text, { skipEmptyLines: false, delimiter: delimiterOf(text) }).data,
  )
  const [head, ...rest] = rows
  if (!head)
    return {
      problem: 'There is nothing to read. Give a line of headings and lines of numbers under it.',
    }
  const problem = headingProblem(head)
  if (problem) return { problem }
  if (rest.length === 0)
    return { problem: 'There is only a line of headings. Give lines of numbers under it.' }
  return { table: { headings: head.cells.map((cell) => cell.trim()), rows: rest } }
}

/** What stands between the cells of the line of headings: the sign that it holds most of. */
export function delimiterOf(text: string): string {
  const heading = text.split('\n').find((line) => !isPassedOver([line])) ?? ''
  const count = (sign: string) => heading.split(sign).length
  return [',', ';', '\t'].reduce((most, sign) => (count(sign) > count(most) ? sign : most))
}

/** Rows with their lines; a quoted cell may run over several. */
export function numberedRows(data: readonly (readonly string[])[], from = 1): CsvRow[] {
  let line = from
  return data.flatMap((cells) => {
    const at = line
    line += linesOf(cells)
    return isPassedOver(cells) ? [] : [{ line: at, cells }]
  })
}

/** Lines that a row takes up. */
export const linesOf = (cells: readonly string[]): number =>
  1 + cells.reduce((breaks, cell) => breaks + (cell.match(/\n/g)?.length ?? 0), 0)

const isPassedOver = (cells: readonly string[]): boolean =>
  cells.every((cell) => cell.trim() === '') || cells[0]!.trimStart().startsWith('#')

export function headingProblem({ line, cells }: CsvRow): string | null {
  const headings = cells.map((cell) => cell.trim())
  const blank = headings.indexOf('')
  if (blank >= 0)
    return `Line ${line}: column ${blank + 1} has no heading. Name it, or take it out.`
  if (headings.every((heading) => readNumber(heading).problem === undefined))
    return `Line ${line} holds numbers. Give a line of headings above them, such as level_ppb,signal_nA.`
  const twice = headings.find((heading, at) => headings.indexOf(heading) !== at)
  return twice
    ? `Line ${line}: two columns are called "${twice}". Give each a name of its own.`
    : null
}

/**
 * The numbers of some columns, row by row. A row is taken only when all of them can be read; every cell
 * that cannot is named.
 */
export function numbersIn(
  { headings, rows }: CsvTable,
  columns: readonly string[],
): { rows: number[][]; refused: Refusal[] } {
  const places = columns.map((column) => headings.indexOf(column))
  const refused: Refusal[] = []
  const taken = rows.flatMap((row) => {
    const wrong = columns.flatMap((column, at) => {
      const why = cellProblem(row.cells[places[at]!])
      return why === null ? [] : [{ line: row.line, column, why }]
    })
    refused.push(...wrong)
    return wrong.length > 0 ? [] : [places.map((place) => readNumber(row.cells[place]!).value!)]
  })
  return { rows: taken, refused }
}

export function cellProblem(cell: string | undefined): string | null {
  if (cell === undefined) return 'the line ends before this column'
  const { value, problem } = readNumber(cell)
  if (problem) return problem
  return value === undefined ? 'blank' : null
}
