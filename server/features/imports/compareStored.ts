import type { ImportEntry } from '#shared/schemas/import.ts'
import type { HeadingOf } from './headings.ts'
import type { FoundProblem } from './readCell.ts'
import type { StoredSubject } from './storedSubjects.ts'

/** What of a row is not here yet, for a subject that is. */
export type Additions = {
  session: boolean
  sensorValues: ImportEntry['sensorValues']
  referenceValues: ImportEntry['referenceValues']
  outcome: ImportEntry['outcome']
}

/**
 * Compares a row with what an earlier import entered. Values that are missing here may be added;
 * another value for something that is here, or a new fact about the subject itself, is refused:
 * an import adds records and never changes a saved one.
 */
export function compareStored(
  entry: ImportEntry,
  stored: StoredSubject,
  heading: HeadingOf,
): { contradictions: FoundProblem[]; adds: Additions | null } {
  const contradictions: FoundProblem[] = []
  const refuse = (column: string, reason: string, found: unknown) =>
    contradictions.push({ column, reason, found: String(found) })

  if (entry.siteId !== stored.siteId)
    contradictions.push({
      column: heading('site'),
      reason: 'This subject is here already, at another site.',
      found: null,
    })
  const facts: [column: string, value: unknown, here: unknown][] = [
    [heading('sex'), entry.sex, stored.sex],
    [heading('ageYears') || heading('ageBand'), entry.ageBand, stored.ageBand],
    ...Object.entries(entry.covariates).map(([key, value]): [string, unknown, unknown] => [
      heading('covariate', key),
      value,
      stored.covariates[key] ?? null,
    ]),
  ]
  for (const [column, value, here] of facts)
    if (value !== null && value !== here)
      refuse(
        column,
        here === null
          ? 'This subject is here already without it. An import does not change saved subjects.'
          : 'This subject is here already with another value.',
        value,
      )
  if (entry.outcome !== null && stored.outcome !== null && entry.outcome !== stored.outcome)
    refuse(heading('outcome'), 'This subject is here already with another outcome.', entry.outcome)

  const session = stored.sessions.get(entry.sessionNumber)
  const adds: Additions = {
    session: session === undefined,
    sensorValues: {},
    referenceValues: {},
    outcome: stored.outcome === null ? entry.outcome : null,
  }
  for (const [key, given] of Object.entries(entry.sensorValues)) {
    const here = session?.sensorValues[key]
    if (!here) adds.sensorValues[key] = given
    else if (here.value !== given.value || here.belowLod !== given.belowLod)
      refuse(heading('sensorValue', key), ANOTHER_VALUE(entry), given.value)
  }
  for (const [key, given] of Object.entries(entry.referenceValues)) {
    const here = session?.referenceValues[key]
    if (here === undefined) adds.referenceValues[key] = given
    else if (here !== given) refuse(heading('referenceValue', key), ANOTHER_VALUE(entry), given)
  }
  return { contradictions, adds: addsNothing(adds) ? null : adds }
}

const ANOTHER_VALUE = (entry: ImportEntry) =>
  `Session ${entry.sessionNumber} of this subject is here already with another value.`

const addsNothing = (adds: Additions): boolean =>
  !adds.session &&
  adds.outcome === null &&
  Object.keys(adds.sensorValues).length === 0 &&
  Object.keys(adds.referenceValues).length === 0
