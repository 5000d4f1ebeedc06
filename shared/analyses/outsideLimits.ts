import type { AgreementFigures, AgreementLineFigures } from '#shared/schemas/agreement.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import type { AgreementPairs } from './agreementPairs.ts'
import { plottedDifference } from './plottedDifference.ts'

export type OutsidePair = {
  subject: string
  subjectId: string
  mean: number
  /** On the scale of the limits. */
  difference: number
  side: 'above' | 'below'
}

/** The pairs outside the limits of agreement, the furthest out first. */
export function outsideLimits(
  { sensor, reference, subjects, subjectIds }: Omit<AgreementPairs, 'counts'>,
  { scale, lowerLimit, upperLimit, centre }: AgreementFigures,
): OutsidePair[] {
  const found = sensor.flatMap((value, at) => {
    const mean = (value + reference[at]!) / 2
    const difference = plottedDifference(scale, value, reference[at]!)
    const above = difference - heightAt(upperLimit, centre, mean)
    const below = heightAt(lowerLimit, centre, mean) - difference
    if (above <= 0 && below <= 0) return []
    const side = above > 0 ? ('above' as const) : ('below' as const)
    const subject = { subject: subjects[at]!, subjectId: subjectIds[at]! }
    return [{ ...subject, mean, difference, side, by: Math.max(above, below) }]
  })
  return found.sort((a, b) => b.by - a.by).map(({ by: _by, ...pair }) => pair)
}

/** Height of a level or sloping line at a mean. */
export const heightAt = (
  { estimate, slope }: AgreementLineFigures,
  centre: number | null,
  mean: number,
): number => estimate + slope * (mean - (centre ?? mean))

/** So many codes are named in a sentence. */
const MOST_NAMED = 20

/** Who lies outside the limits, by code, as a sentence. */
export function outsideWords(
  pairs: Omit<AgreementPairs, 'counts'>,
  figures: AgreementFigures,
): string {
  const outside = outsideLimits(pairs, figures)
  const many = `${formatCount(outside.length)} of ${formatCount(pairs.sensor.length)} pairs`
  if (outside.length === 0) return 'No pair lies outside the limits.'
  const codes = [...new Set(outside.map(({ subject }) => subject))]
  const named = codes.slice(0, MOST_NAMED).join(', ')
  const more = codes.length - MOST_NAMED
  return `Outside the limits: ${many}, of ${named}${more > 0 ? ` and ${formatCount(more)} more` : ''}. ${LOOK}`
}

/** What to make of pairs outside the limits. */
export const LOOK = 'Look at where each comes from; a value is not wrong because it lies outside.'
