import { group } from 'd3-array'
import type { DatasetRow } from '#shared/schemas/dataset.ts'
import type { StudyTables } from './studyTables.ts'

type Session = StudyTables['sessions'][number]

/**
 * A study's data as rows to analyse: one for each breath session, and one for a subject without any;
 * in order of subject code and session number.
 */
export function datasetRowsOf(tables: StudyTables): DatasetRow[] {
  const siteById = new Map(tables.sites.map((site) => [site.id, site.prefix]))
  const keyById = new Map(tables.analytes.map((analyte) => [analyte.id, analyte.key]))
  const outcomeBySubject = new Map(
    tables.referenceOutcomes.map((each) => [each.subjectId, each.outcome]),
  )
  const sessionsBySubject = group(tables.sessions, (session) => session.subjectId)
  const valuesBySession = group(tables.sessionValues, (value) => value.sessionId)
  const referencesBySession = group(tables.referenceMeasurements, (each) => each.sessionId)

  const sensorValues = (session: Session): DatasetRow['sensorValues'] =>
    Object.fromEntries(
      (valuesBySession.get(session.id) ?? []).map(({ analyteId, value, belowLod }) => [
        keyById.get(analyteId)!,
        { value, belowLod },
      ]),
    )
  const referenceValues = (session: Session): DatasetRow['referenceValues'] =>
    Object.fromEntries(
      (referencesBySession.get(session.id) ?? []).map(({ analyteId, value }) => [
        keyById.get(analyteId)!,
        value,
      ]),
    )

  return [...tables.subjects].sort(byCode).flatMap((subject): DatasetRow[] => {
    const common = {
      subject: subject.code,
      subjectId: subject.id,
      site: siteById.get(subject.siteId)!,
      sex: subject.sex,
      ageBand: subject.ageBand,
      covariates: subject.covariates,
      outcome: outcomeBySubject.get(subject.id) ?? null,
    }
    const own = sessionsBySubject.get(subject.id)
    if (!own) return [{ ...common, session: null, sensorValues: {}, referenceValues: {} }]
    return [...own]
      .sort((a, b) => a.number - b.number)
      .map((session) => ({
        ...common,
        session: session.number,
        sensorValues: sensorValues(session),
        referenceValues: referenceValues(session),
      }))
  })
}

/** By code unit, so that the order is the same wherever it is computed. */
function byCode(a: { code: string }, b: { code: string }): number {
  return a.code < b.code ? -1 : a.code > b.code ? 1 : 0
}
