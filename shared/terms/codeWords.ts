import type { ColumnMeaning, MeaningOf } from '#shared/schemas/import.ts'

/** Words of a code are compared without regard to capitals. */
export const plainWord = (word: string): string => word.normalize('NFC').toLowerCase()

type Coding = Record<string, readonly string[]>

/** Words in common use for each side. Codes such as 1 and 2 say nothing by themselves: they stay open. */
const OUTCOME_WORDS = {
  present: ['1', 'yes', 'y', 'true', 'present', 'positive', 'pos', 'case', 'diseased', '+'],
  absent: ['0', 'no', 'n', 'false', 'absent', 'negative', 'neg', 'control', 'healthy', '-'],
  indeterminate: ['indeterminate', 'unclear', 'equivocal', 'borderline', 'not classified'],
} as const satisfies Coding

const SEX_WORDS = {
  F: ['f', 'female', 'woman', 'girl', 'w'],
  M: ['m', 'male', 'man', 'boy'],
  other: ['other', 'x', 'd', 'diverse', 'intersex', 'non-binary'],
  unknown: ['u', 'unknown', 'not recorded', 'na', 'n/a', '-'],
} as const satisfies Coding

/** The words of a column, each on the side where it belongs by common use. */
export const outcomeCoding = (words: readonly string[]): MeaningOf<'outcome'> => ({
  as: 'outcome',
  ...sorted(words, OUTCOME_WORDS),
})

export const sexCoding = (words: readonly string[]): MeaningOf<'sex'> => ({
  as: 'sex',
  ...sorted(words, SEX_WORDS),
})

/** Whether a column of few words holds some for present and some for absent; others stay open. */
export function looksLikeOutcome(words: readonly string[]): boolean {
  const { present, absent } = outcomeCoding(words)
  return words.length <= MOST_OUTCOME_WORDS && present.length > 0 && absent.length > 0
}
const MOST_OUTCOME_WORDS = 8

function sorted<C extends Coding>(words: readonly string[], coding: C) {
  const sides = Object.keys(coding) as (keyof C & string)[]
  return Object.fromEntries(
    sides.map((side) => [
      side,
      words.filter((word) => coding[side]!.includes(plainWord(word))).slice(0, 20),
    ]),
  ) as { [Side in keyof C]: string[] }
}

/** The sides of a coded column with their words. */
export function sidesOf(meaning: ColumnMeaning): [side: string, words: readonly string[]][] {
  if (meaning.as === 'outcome') {
    const { present, absent, indeterminate } = meaning
    return Object.entries({ present, absent, indeterminate })
  }
  if (meaning.as === 'sex') {
    const { F, M, other, unknown } = meaning
    return Object.entries({ F, M, other, unknown })
  }
  return []
}
