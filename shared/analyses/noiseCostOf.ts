import type { DatasetRow } from '#shared/schemas/dataset.ts'
import type { NoiseCost } from '#shared/schemas/precision.ts'
import { moments } from '#shared/statistics/description/moments.ts'
import { normalQuantile } from '#shared/statistics/distributions/normalQuantile.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { correctedArea } from '#shared/statistics/sensor/correctedArea.ts'
import { expectedArea } from '#shared/statistics/sensor/expectedArea.ts'
import type { SessionRule } from '#shared/terms/analysis.ts'
import { accuracyValues } from './accuracyValues.ts'

/** A stored accuracy analysis, as far as noise is set against it. */
export type StoredArea = {
  number: number
  area: number | null
  analyteKey: string
  sessionRule: SessionRule
}

/** Means of so many sessions a subject are looked at. */
const SESSIONS = [1, 2, 3, 5, 10]
const NO_AREA = 'That accuracy analysis gives counts and no area, so there is nothing to correct.'
const OTHER_RULE =
  'That accuracy analysis takes the median or every session of a subject, for which the noise of the value that went in is not known. Choose one that takes the first session or the mean.'
const CLEAR_CUT =
  'The area is 0 or 1, where nothing on the scale of normal values can be freed from noise.'

/**
 * What the noise from session to session costs a stored area: the area freed from it, and expected with
 * the mean of several sessions, for values that are normal within each class.
 * @param withinVariance of a single session within subjects, in squared units
 */
export function noiseCostOf(
  rows: readonly DatasetRow[],
  { number, area, analyteKey, sessionRule }: StoredArea,
  withinVariance: number,
): NoiseCost {
  const without = (note: string): NoiseCost => ({
    analysisNumber: number,
    observedArea: area ?? 0,
    areaWithoutNoise: null,
    expected: [],
    note,
  })
  if (area === null) return without(NO_AREA)
  if (sessionRule === 'median' || sessionRule === 'every') return without(OTHER_RULE)
  if (area <= 0 || area >= 1) return without(CLEAR_CUT)
  const { present, absent } = accuracyValues(rows, analyteKey, sessionRule)
  const observed = { present: moments(present).sd ** 2, absent: moments(absent).sd ** 2 }
  const errorVariance = withinVariance * (sessionRule === 'mean' ? meanShare(rows, analyteKey) : 1)
  try {
    const areaWithoutNoise = correctedArea(area, {
      observedVariancePresent: observed.present,
      observedVarianceAbsent: observed.absent,
      errorVariance,
    })
    const half = (observed.present + observed.absent) / 2 - errorVariance
    return {
      analysisNumber: number,
      observedArea: area,
      areaWithoutNoise,
      expected: SESSIONS.map((sessions) => ({
        sessions,
        area: expectedArea({
          meanPresent: normalQuantile(areaWithoutNoise) * Math.sqrt(2 * half),
          meanAbsent: 0,
          // Only the sum of the two true variances moves the area.
          sdPresent: Math.sqrt(half),
          sdAbsent: Math.sqrt(half),
          sdReading: Math.sqrt(withinVariance),
          replicates: sessions,
        }).observedArea,
      })),
      note: null,
    }
  } catch (error) {
    if (error instanceof StatisticsError) return without(error.message)
    throw error
  }
}

/** The mean of 1/m over subjects with m sessions: what averaging leaves of the variance of one. */
function meanShare(rows: readonly DatasetRow[], analyteKey: string): number {
  const sessions = new Map<string, number>()
  for (const { subjectId, sensorValues, outcome } of rows)
    if (sensorValues[analyteKey] && (outcome === 'present' || outcome === 'absent'))
      sessions.set(subjectId, (sessions.get(subjectId) ?? 0) + 1)
  const shares = [...sessions.values()].map((many) => 1 / many)
  return shares.reduce((sum, share) => sum + share, 0) / shares.length
}
