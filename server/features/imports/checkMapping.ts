import { AppError, refuseField } from '#shared/errors/AppError.ts'
import type { ColumnMeaning, ImportColumn, ImportMapping } from '#shared/schemas/import.ts'
import { plainWord, sidesOf } from '#shared/terms/codeWords.ts'
import { MEANING_LABELS, SUSPICION_WORDS } from '#shared/terms/importColumn.ts'

export type MappingContext = {
  /** The file's columns under the delimiter that the mapping says. */
  columns: readonly ImportColumn[]
  siteIds: ReadonlySet<string>
  analyteKeys: ReadonlySet<string>
}

/** Meanings that only one column of a file can have. */
const ONCE = ['subject', 'site', 'sessionNumber', 'sex', 'outcome'] as const
const DATA = new Set(['sensorValue', 'referenceValue', 'outcome'])

/**
 * Checks the meanings as a whole.
 * @throws AppError invalid with a sentence at the place of each, such as `mapping.columns.3.meaning`
 */
export function checkMapping(mapping: ImportMapping, context: MappingContext): void {
  requireSameHeadings(mapping, context)
  const fields = { ...columnProblems(mapping, context), ...wholeProblems(mapping, context) }
  if (Object.keys(fields).length > 0) throw new AppError('invalid', { fields })
}

type Fields = Record<string, string>

function requireSameHeadings(mapping: ImportMapping, { columns }: MappingContext): void {
  const alike =
    mapping.columns.length === columns.length &&
    mapping.columns.every((column, index) => column.name === columns[index]?.name)
  if (!alike)
    refuseField('mapping.columns', 'These are not the columns of this file. Load the page again.')
}

function columnProblems(mapping: ImportMapping, context: MappingContext): Fields {
  const fields: Fields = {}
  const seen = new Map<string, string>()
  const sensors = new Set(
    mapping.columns.flatMap(({ meaning }) =>
      meaning.as === 'sensorValue' ? [meaning.analyteKey] : [],
    ),
  )
  mapping.columns.forEach(({ name, meaning, declared }, index) => {
    const at = `mapping.columns.${index}`
    if (meaning.as === 'leaveOut') return
    const once = onceKey(meaning)
    const other = once === null ? undefined : seen.get(once)
    if (other !== undefined)
      fields[`${at}.meaning`] = `“${other}” is already the ${onceLabel(meaning)}.`
    if (once !== null) seen.set(once, name)
    if ('analyteKey' in meaning && !context.analyteKeys.has(meaning.analyteKey))
      fields[`${at}.meaning.analyteKey`] = 'Choose one of the analytes of this study.'
    else if (meaning.as === 'belowLod' && !sensors.has(meaning.analyteKey))
      fields[`${at}.meaning.analyteKey`] = 'No column holds the sensor value of this analyte.'
    Object.assign(fields, codingProblems(meaning, at))
    const suspicion = context.columns[index]?.suspicion
    if (suspicion && !declared)
      fields[`${at}.declared`] =
        `This column looks like ${SUSPICION_WORDS[suspicion]}. Leave it out, or say what it holds.`
  })
  return fields
}

function onceKey(meaning: ColumnMeaning): string | null {
  if (meaning.as === 'covariate') return `covariate ${meaning.key}`
  if (meaning.as === 'ageYears' || meaning.as === 'ageBand') return 'age'
  if ('analyteKey' in meaning) return `${meaning.as} ${meaning.analyteKey}`
  return (ONCE as readonly string[]).includes(meaning.as) ? meaning.as : null
}

function onceLabel(meaning: ColumnMeaning): string {
  if (meaning.as === 'covariate') return `covariate ${meaning.key}`
  if (meaning.as === 'ageYears' || meaning.as === 'ageBand') return 'age'
  const label = MEANING_LABELS[meaning.as].toLowerCase()
  return 'analyteKey' in meaning ? `${label} of ${meaning.analyteKey}` : label
}

/** A coded column needs words, and each word stands on one side only. */
function codingProblems(meaning: ColumnMeaning, at: string): Fields {
  const fields: Fields = {}
  const sides = sidesOf(meaning)
  if (sides.length === 0) return fields
  const seen = new Map<string, string>()
  for (const [side, words] of sides)
    for (const word of words) {
      const other = seen.get(plainWord(word))
      if (other !== undefined && other !== side)
        fields[`${at}.meaning.${side}`] = `“${word}” stands for something else already.`
      seen.set(plainWord(word), side)
    }
  if (seen.size === 0) fields[`${at}.meaning`] = 'Say which words of this column stand for what.'
  return fields
}

function wholeProblems(mapping: ImportMapping, { siteIds }: MappingContext): Fields {
  const fields: Fields = {}
  const meanings = mapping.columns.map((column) => column.meaning.as)
  if (!meanings.includes('subject'))
    fields['mapping.columns'] = 'Say which column tells the subjects apart.'
  else if (!meanings.some((as) => DATA.has(as)))
    fields['mapping.columns'] =
      'Say which column holds a sensor value, a reference analyser value or the outcome.'
  if (meanings.includes('site')) {
    if (mapping.siteId !== null)
      fields['mapping.siteId'] = 'A column names the site already. Choose one of the two.'
    if (Object.keys(mapping.sitesByWord).length === 0)
      fields['mapping.sitesByWord'] = 'Say which word stands for which site.'
  } else if (mapping.siteId === null)
    fields['mapping.siteId'] = 'Choose the site that the rows belong to.'
  else if (!siteIds.has(mapping.siteId))
    fields['mapping.siteId'] = 'Choose one of the sites of this study.'
  for (const [word, siteId] of Object.entries(mapping.sitesByWord))
    if (!siteIds.has(siteId))
      fields[`mapping.sitesByWord.${word}`] = 'Choose one of the sites of this study.'
  return fields
}
