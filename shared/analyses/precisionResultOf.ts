import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import {
  INTRACLASS_FORMS,
  type PrecisionFigures,
  type PrecisionParameters,
  type PrecisionResult,
} from '#shared/schemas/precision.ts'
import { AGREEMENT_METHODS } from '#shared/statistics/agreement/AGREEMENT_METHODS.ts'
import { intraclassCorrelations } from '#shared/statistics/agreement/intraclassCorrelations.ts'
import { type Repeatability, repeatability } from '#shared/statistics/agreement/repeatability.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { replicatesForReliability } from '#shared/statistics/sensor/replicatesForReliability.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { frozenAnalyteOf } from './frozenAnalyteOf.ts'
import { noiseCostOf, type StoredArea } from './noiseCostOf.ts'
import { readingGroups } from './readingGroups.ts'

type Frozen = {
  manifest: DatasetManifest
  rows: readonly DatasetRow[]
  storedArea: StoredArea | null
}

const BETWEEN_SESSIONS =
  'Between sessions of a subject lies everything that changes from one to the next: the sensor’s own noise and the body’s. The spread within subjects is that of both together.'
const NEGATIVE =
  'Subjects differ no more from each other than their own sessions do, so the spread between subjects is put at 0 and a reliability is not above 0.'
const NO_UNIT_INTERVAL = 'No interval: no error is left at all.'

/**
 * How well readings of one analyte repeat from session to session within subjects, and what the noise
 * costs a stored area.
 * @throws StatisticsError too-few (fewer than two subjects, or nobody with a second session)
 */
export function precisionResultOf(
  { manifest, rows, storedArea }: Frozen,
  parameters: PrecisionParameters,
): PrecisionResult {
  const { analyteKey, measuredBy, confidence: level, reliabilityWanted } = parameters
  const { name, unit } = frozenAnalyteOf(manifest.analytes, analyteKey)
  const { groups, counts } = readingGroups(rows, analyteKey, measuredBy)
  if (groups.length > 0 && counts.severalSessions === 0)
    throw new StatisticsError(
      'too-few',
      `Each of the ${formatCount(groups.length)} subjects has a value in one session only, so how readings repeat from session to session cannot be told. It takes subjects with a second session.`,
    )
  const found = repeatability(groups, { level })
  const withinVariance = found.withinSubjectSd ** 2
  return {
    kind: 'precision',
    analyteName: name,
    unit,
    counts,
    withinSubjectSd: {
      estimate: found.withinSubjectSd,
      ...found.withinSubjectSdInterval,
      method: AGREEMENT_METHODS.withinSubject.name,
      note: null,
    },
    repeatabilityCoefficient: found.repeatabilityCoefficient,
    mean: found.analysis.grandMean,
    cvPercent: found.cvPercent,
    cvLogPercent: found.cvLogPercentLognormal,
    betweenSubjectSd: Math.sqrt(Math.max(0, found.betweenSubjectVariance)),
    reliability: found.reliability,
    effectiveSessions: found.analysis.effectiveReplicates,
    ...intraclassOf(groups, level),
    sessionsForReliability: sessionsFor(found, reliabilityWanted),
    noise: storedArea && noiseCostOf(rows, storedArea, withinVariance),
    caveats: [BETWEEN_SESSIONS, ...(found.betweenSubjectVariance < 0 ? [NEGATIVE] : [])],
  }
}

/** The six forms need a full table: every subject with the same number of sessions. */
function intraclassOf(
  groups: number[][],
  level: number,
): Pick<PrecisionFigures, 'intraclass' | 'sessionsEach'> {
  const sessionsEach = groups[0]?.length ?? 0
  const even = sessionsEach > 1 && groups.every(({ length }) => length === sessionsEach)
  if (!even) return { intraclass: null, sessionsEach: null }
  const found = orNull(() => intraclassCorrelations(groups, { level }))
  if (!found) return { intraclass: null, sessionsEach }
  return {
    sessionsEach,
    intraclass: INTRACLASS_FORMS.map((form) => {
      const { estimate, lower, upper } = found[form]
      const note = lower === null || upper === null ? NO_UNIT_INTERVAL : null
      return { form, estimate, lower, upper, method: AGREEMENT_METHODS.intraclass.name, note }
    }),
  }
}

function sessionsFor({ reliability }: Repeatability, wanted: number): number | null {
  if (reliability === null || reliability <= 0 || reliability >= 1) return null
  return replicatesForReliability(reliability, wanted).replicates
}

function orNull<T>(compute: () => T): T | null {
  try {
    return compute()
  } catch (error) {
    if (error instanceof StatisticsError) return null
    throw error
  }
}
