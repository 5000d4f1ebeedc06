import type { ColumnMeaning, FoundColumn, Meaning } from '#shared/schemas/import.ts'
import { outcomeCoding, sexCoding } from '#shared/terms/codeWords.ts'

/** A meaning that was just chosen, with what the column itself suggests for it. */
export function newMeaning(
  as: Meaning,
  column: FoundColumn,
  analytes: readonly { key: string }[],
): ColumnMeaning {
  if (column.suggestion.as === as) return column.suggestion
  const analyteKey = analytes.length === 1 ? analytes[0]!.key : ''
  switch (as) {
    case 'sex':
      return sexCoding(column.words ?? [])
    case 'outcome':
      return outcomeCoding(column.words ?? [])
    case 'ageYears':
      return { as, andOver: null }
    case 'sensorValue':
    case 'belowLod':
    case 'referenceValue':
      return { as, analyteKey }
    case 'covariate':
      return { as, key: covariateKey(column.name) }
    default:
      return { as }
  }
}

/** The heading as a key: small letters, digits and _, a letter first. */
function covariateKey(heading: string): string {
  const key = heading
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '_')
    .replace(/^[^a-z]+|_+$/g, '')
  return key.slice(0, 40)
}
