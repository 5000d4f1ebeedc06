import type { ImportMapping, MappedColumn } from '#shared/schemas/import.ts'
import { plainWord, sidesOf } from '#shared/terms/codeWords.ts'
import type { CsvRow } from './csvRows.ts'
import { type Reading, type ReadRow, readCell } from './readCell.ts'

/** Builds the reader of a file's rows under a checked mapping. @param gasKeys analytes that cannot be below 0 */
export function rowReader(
  mapping: ImportMapping,
  gasKeys: ReadonlySet<string>,
): (row: CsvRow) => ReadRow {
  const meant = mapping.columns.flatMap((column, index) =>
    column.meaning.as === 'leaveOut' ? [] : [{ ...column, index }],
  )
  const shared = {
    format: mapping.format,
    gasKeys,
    sites: new Map(
      Object.entries(mapping.sitesByWord).map(([word, siteId]) => [plainWord(word), siteId]),
    ),
    codes: new Map(meant.map((column) => [column.name, codesOf(column)])),
  }
  return ({ line, cells }) => {
    const row: Reading = { ...shared, ...emptyRow(line, mapping.siteId ?? '') }
    if (cells.length === mapping.columns.length) {
      for (const column of meant) readCell(row, column, cells[column.index]!)
      applyFlags(row)
    } else
      row.problems.push({
        column: '',
        reason: `The line has ${cells.length} cells, the headings are ${mapping.columns.length}.`,
        found: null,
      })
    const { entry, problems, blanks } = row
    return { line, entry, problems, blanks }
  }
}

const emptyRow = (line: number, siteId: string): ReadRow & Pick<Reading, 'flags'> => ({
  line,
  problems: [],
  blanks: [],
  flags: new Map(),
  entry: {
    subjectWord: '',
    siteId,
    sessionNumber: null,
    sex: null,
    ageBand: null,
    sensorValues: {},
    referenceValues: {},
    outcome: null,
    covariates: {},
  },
})

const codesOf = ({ meaning }: MappedColumn): Map<string, string> =>
  new Map(
    sidesOf(meaning).flatMap(([side, words]) =>
      words.map((word) => [plainWord(word), side] as const),
    ),
  )

/** A flag counts where there is a value; a value whose flag is blank could be either. */
function applyFlags(row: Reading): void {
  for (const [analyteKey, { column, flag }] of row.flags) {
    const value = row.entry.sensorValues[analyteKey]
    if (!value) continue
    if (flag === null)
      row.problems.push({
        column,
        reason: 'The flag is missing, although there is a value.',
        found: null,
      })
    else value.belowLod = flag
  }
}
