import type { Delimiter, FoundColumn, ImportReading } from '#shared/schemas/import.ts'
import type { CsvHead } from './csvHead.ts'
import { type StudyTerms, suggestMeanings } from './suggestMeanings.ts'
import { suspicionOfColumn } from './suspicion.ts'

export type StudySites = readonly { id: string; name: string; prefix: string }[]

const MOST_SAMPLES = 5
const MOST_SAMPLE_CHARACTERS = 60
/** More different values than that are no code. */
const MOST_WORDS = 20

/** Headings and what they look like; nothing of the cells. */
export const columnsOf = (head: CsvHead) =>
  head.headings.map((name, index) => ({
    name,
    suspicion: suspicionOfColumn(name, cellsOf(head, index)),
  }))

/** The columns with samples, but for those that could identify somebody, and a suggestion for each. */
export function readColumns(
  head: CsvHead,
  delimiter: Delimiter,
  study: Omit<StudyTerms, 'sites'> & { sites: StudySites },
): ImportReading {
  const looked = columnsOf(head).map((column, index) => {
    const values = cellsOf(head, index)
    const different = [...new Set(values)]
    const few = different.length <= MOST_WORDS && different.every((word) => word.length <= 60)
    return { ...column, values, different, words: few ? different.toSorted() : null }
  })
  const suggestions = suggestMeanings(looked, study)
  const columns = looked.map(
    ({ name, suspicion, values, different, words }, index): FoundColumn => ({
      name,
      suspicion,
      samples: suspicion ? [] : different.slice(0, MOST_SAMPLES).map(shortened),
      words: suspicion ? null : words,
      blanks: head.rows.length - values.length,
      suggestion: suggestions[index]!,
    }),
  )
  const siteColumn = columns.find((column) => column.suggestion.as === 'site')
  return {
    delimiter,
    rowsRead: head.rows.length,
    wholeFile: head.wholeFile,
    columns,
    siteId: study.sites.length === 1 && !siteColumn ? study.sites[0]!.id : null,
    sitesByWord: sitesNamed(siteColumn?.words ?? [], study.sites),
  }
}

const cellsOf = (head: CsvHead, index: number): string[] =>
  head.rows.map((cells) => cells[index] ?? '').filter((cell) => cell !== '')

const shortened = (text: string) =>
  text.length > MOST_SAMPLE_CHARACTERS ? `${text.slice(0, MOST_SAMPLE_CHARACTERS - 1)}…` : text

/** Words that are a site's name or prefix. */
function sitesNamed(words: readonly string[], sites: StudySites): Record<string, string> {
  const named: Record<string, string> = {}
  for (const word of words) {
    const site = sites.find((each) =>
      [each.name, each.prefix].some((name) => name.toLowerCase() === word.toLowerCase()),
    )
    if (site) named[word] = site.id
  }
  return named
}
