import type { TroubledResults } from '#shared/schemas/accuracyMore.ts'
import type { AccuracyAtCutOff } from '#shared/statistics/cutOffs/accuracyAtCutOff.ts'
import { referenceIndeterminates } from '#shared/statistics/cutOffs/referenceIndeterminates.ts'
import { twoByTwo } from '#shared/statistics/cutOffs/twoByTwo.ts'
import { withIndeterminates } from '#shared/statistics/cutOffs/withIndeterminates.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import { proportionOf } from './proportionOf.ts'
import type { SubjectValues } from './subjectValues.ts'

type Zone = { lower: number; upper: number }
type At = { cutOff: number; zone: Zone | null; direction: Direction; confidence: number }

/**
 * What becomes of accuracy at a cut-off when results in a zone around it are taken for positive or for
 * negative, when indeterminate reference outcomes agree with the sensor or disagree, and how many
 * subjects with an outcome have no valid result. A zone of null counts no result as indeterminate.
 * @param subjects each with one value of the analyte or null
 */
export function troubledResultsOf(
  subjects: readonly SubjectValues[],
  { cutOff, zone, direction, confidence: level }: At,
): TroubledResults {
  const ofOutcome = (outcome: string) =>
    subjects.filter((each) => each.outcome === outcome).map((each) => each.values[0] ?? null)
  const valid = (values: (number | null)[]) => values.filter((value) => value !== null)
  const inZone = (value: number) => zone !== null && value >= zone.lower && value <= zone.upper
  const present = ofOutcome('present')
  const absent = ofOutcome('absent')
  const clear = (values: (number | null)[]) => valid(values).filter((value) => !inZone(value))
  const trouble = {
    indeterminatePresent: valid(present).filter(inZone).length,
    indeterminateAbsent: valid(absent).filter(inZone).length,
    noValidPresent: present.length - valid(present).length,
    noValidAbsent: absent.length - valid(absent).length,
  }
  const table = (one: (number | null)[], other: (number | null)[]) =>
    twoByTwo({ present: clear(one), absent: clear(other), direction }, cutOff)
  const clearTable = table(present, absent)
  const index = withIndeterminates(clearTable, trouble, { level })
  const open = clear(ofOutcome('indeterminate'))
  const positive = open.filter((value) =>
    direction === 'higher' ? value >= cutOff : value <= cutOff,
  )
  const counts = { indexPositive: positive.length, indexNegative: open.length - positive.length }
  const reference = referenceIndeterminates(clearTable, counts, { level })
  return {
    zone,
    index: {
      ...trouble,
      scenarios: [
        scenario('leftOut', index.leftOut),
        scenario('countedPositive', index.countedPositive),
        scenario('countedNegative', index.countedNegative),
      ],
      determinate: proportionOf(index.determinate),
      valid: proportionOf(index.valid),
    },
    reference: {
      ...counts,
      scenarios: [
        scenario('leftOut', reference.leftOut),
        scenario('best', reference.best),
        scenario('worst', reference.worst),
      ],
    },
  }
}

type Scenario = TroubledResults['index']['scenarios'][number]

const scenario = (key: Scenario['key'], at: AccuracyAtCutOff): Scenario => ({
  key,
  sensitivity: proportionOf(at.sensitivity),
  specificity: proportionOf(at.specificity),
})
