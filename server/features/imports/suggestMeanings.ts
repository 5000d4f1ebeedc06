import type { ColumnMeaning, MeaningOf, OPEN_AGES, Suspicion } from '#shared/schemas/import.ts'
import { looksLikeOutcome, outcomeCoding, sexCoding } from '#shared/terms/codeWords.ts'

export type LookedAt = {
  name: string
  suspicion: Suspicion | null
  /** Cells of the first rows, blank ones left out. */
  values: readonly string[]
  /** The different ones, where they are few. */
  words: readonly string[] | null
}

export type StudyTerms = {
  analytes: readonly { key: string; name: string; formula: string | null }[]
  sites: readonly { name: string; prefix: string }[]
  targetCondition: string
}

const SUBJECT = /^(subject|participant|subj|person|id|code)( (id|no|nr|number|code))?$/
const SESSION = /^(session|visit|replicate|repeat|occasion)( (no|nr|number))?$/
const SITE = /^(site|centre|center|hospital|clinic|ward)( (name|code|id))?$/
const SEX = /^(sex|gender)$/
const AGE = /^age( (y|yr|yrs|year|years))?$/
const AGE_BAND = /^age (band|group|range)$/
const BELOW_LOD = /\b(below|under|lod|censored)\b/
const REFERENCE =
  /\b(ref|reference|analyser|analyzer|lab|laboratory|gc|ms|crds|chemiluminescence)\b/
const OUTCOME = /\b(label|outcome|disease|diagnosis|case|status|condition|target|reference)\b/
const UNNAMED = ''
const UNIT = /\b(ppb|ppm|ppt|exhaled|breath|feno)\b/

/**
 * What each column probably means, so that a person mostly confirms. A column that could identify
 * somebody, and one that nothing speaks for, are left out.
 */
export function suggestMeanings(columns: readonly LookedAt[], study: StudyTerms): ColumnMeaning[] {
  const outcome = outcomeColumn(columns, study.targetCondition)
  const taken = new Set<string>()
  const meanings = columns.map((column): ColumnMeaning => {
    const meaning = column === outcome ? outcomeOf(column) : meaningOf(column, study)
    const once = key(meaning)
    if (once === null || column.suspicion || taken.has(once)) return { as: 'leaveOut' }
    taken.add(once)
    return meaning
  })
  return meanings.map((meaning) =>
    meaning.as === 'belowLod' ? flagOf(meaning, meanings) : meaning,
  )
}

/** A flag that names no analyte belongs to the only sensor value; between several a person decides. */
function flagOf(flag: MeaningOf<'belowLod'>, all: readonly ColumnMeaning[]): ColumnMeaning {
  const sensors = all.filter((meaning) => meaning.as === 'sensorValue')
  if (flag.analyteKey !== UNNAMED) return flag
  return sensors.length === 1 ? { ...flag, analyteKey: sensors[0]!.analyteKey } : { as: 'leaveOut' }
}

/** What a column can stand for only once; null for a column that is left out. */
function key(meaning: ColumnMeaning): string | null {
  if (meaning.as === 'leaveOut') return null
  if (meaning.as === 'ageBand') return 'ageYears'
  return 'analyteKey' in meaning ? `${meaning.as} ${meaning.analyteKey}` : meaning.as
}

function meaningOf(column: LookedAt, study: StudyTerms): ColumnMeaning {
  const heading = plain(column.name)
  if (SUBJECT.test(heading)) return { as: 'subject' }
  if (SESSION.test(heading)) return { as: 'sessionNumber' }
  if (SITE.test(heading) || namesSites(column, study)) return { as: 'site' }
  if (SEX.test(heading)) return sexCoding(column.words ?? [])
  if (AGE_BAND.test(heading)) return { as: 'ageBand' }
  if (AGE.test(heading)) return { as: 'ageYears', andOver: openAge(column.values) }
  const analyteKey = analyteOf(heading, study.analytes)
  if (BELOW_LOD.test(heading)) return { as: 'belowLod', analyteKey: analyteKey ?? UNNAMED }
  if (analyteKey && REFERENCE.test(heading)) return { as: 'referenceValue', analyteKey }
  return analyteKey ? { as: 'sensorValue', analyteKey } : { as: 'leaveOut' }
}

/** Among the columns with the words of an outcome: the one that names the condition, or is called one. */
function outcomeColumn(columns: readonly LookedAt[], condition: string): LookedAt | undefined {
  const target = new Set(plain(condition).split(' '))
  const score = (column: LookedAt) => {
    if (column.suspicion || !looksLikeOutcome(column.words ?? [])) return 0
    const heading = plain(column.name)
    if (BELOW_LOD.test(heading)) return 0
    const named = heading.split(' ').filter((word) => word.length > 2 && target.has(word)).length
    return named * 2 + (OUTCOME.test(heading) ? 1 : 0)
  }
  const best = Math.max(0, ...columns.map(score))
  return best > 0 ? columns.find((column) => score(column) === best) : undefined
}

const outcomeOf = (column: LookedAt): ColumnMeaning => outcomeCoding(column.words ?? [])

/** Every word of the column is a site's name or prefix. */
function namesSites({ words }: LookedAt, { sites }: StudyTerms): boolean {
  const names = new Set(sites.flatMap(({ name, prefix }) => [plain(name), plain(prefix)]))
  return words !== null && words.length > 0 && words.every((word) => names.has(plain(word)))
}

/** The analyte that a heading names by key, by name, or by formula beside a unit of breath. */
function analyteOf(heading: string, analytes: StudyTerms['analytes']): string | null {
  const padded = ` ${heading} `
  for (const { key, name } of analytes)
    if (padded.includes(` ${plain(key)} `) || padded.includes(` ${plain(name)} `)) return key
  for (const { key, formula } of analytes) {
    const feno = key === 'nitric_oxide' && padded.includes(' feno ')
    if (feno || (formula && UNIT.test(heading) && padded.includes(` ${plain(formula)} `)))
      return key
  }
  return null
}

/** 80 or 85 when it is the oldest age and there are more people of it than of the three years before. */
function openAge(values: readonly string[]): (typeof OPEN_AGES)[number] | null {
  const counts = new Map<number, number>()
  for (const value of values) counts.set(Number(value), (counts.get(Number(value)) ?? 0) + 1)
  const oldest = Math.max(...counts.keys())
  if (oldest !== 80 && oldest !== 85) return null
  const before = [1, 2, 3].map((years) => counts.get(oldest - years) ?? 0)
  const here = counts.get(oldest) ?? 0
  return here > Math.max(2, ...before) ? oldest : null
}

/** Small letters and digits parted by single blanks; subscripts are digits; camel case is parted. */
const plain = (text: string): string =>
  text
    .normalize('NFKC')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/[^\p{L}\d]+/gu, ' ')
    .trim()
