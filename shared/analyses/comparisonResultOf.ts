import type { ComparisonParameters, ComparisonResult } from '#shared/schemas/comparison.ts'
import type { DatasetManifest, DatasetRow } from '#shared/schemas/dataset.ts'
import { holmAdjustment } from '#shared/statistics/accuracy/holmAdjustment.ts'
import {
  type IndependentAreas,
  independentAreas,
} from '#shared/statistics/accuracy/independentAreas.ts'
import { pairedDelong } from '#shared/statistics/accuracy/pairedDelong.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { venkatramanTest } from '#shared/statistics/accuracy/venkatramanTest.ts'
import { METHODS } from '#shared/statistics/METHODS.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { SUBGROUPING_LABELS } from '#shared/terms/analysis.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import { areaEstimateOf } from './areaEstimateOf.ts'
import { type CompleteSubject, completeSubjects } from './completeSubjects.ts'
import { tooFew, withheldSentence } from './leastPerClass.ts'
import { storedCurveOf } from './storedCurveOf.ts'

type Analytes = DatasetManifest['analytes']
type Compared = ComparisonResult['curves'][number] & {
  values: { present: number[]; absent: number[] }
}
type Paired = Extract<ComparisonParameters['compare'], { design: 'paired' }>
type Independent = Extract<ComparisonParameters['compare'], { design: 'independent' }>
type Comparison = ComparisonResult['comparisons'][number]

/**
 * Compares areas under curves: of two to four biomarkers in the subjects who have all of them, or of
 * one biomarker in two groups of subjects.
 * @throws StatisticsError one-class, non-finite, too-few
 */
export function comparisonResultOf(
  rows: readonly DatasetRow[],
  analytes: Analytes,
  { sessionRule, confidence, compare }: ComparisonParameters,
  onProgress?: (share: number) => void,
): ComparisonResult {
  const markers = compare.design === 'paired' ? compare.markers : [compare.marker]
  const named = markers.map(({ analyteKey }) => analytes.find((each) => each.key === analyteKey)!)
  const { subjects, counts } = completeSubjects(
    rows,
    markers.map((each) => each.analyteKey),
    sessionRule,
  )
  const curves =
    compare.design === 'paired'
      ? markers.map(({ direction }, at) =>
          curveOf(subjects, at, direction, named[at]!.name, named[at]!.unit, confidence),
        )
      : compare.groups.map((group) =>
          curveOf(
            subjects.filter((each) => groupOf(each, compare.by) === group),
            0,
            compare.marker.direction,
            groupLabel(compare.by, group),
            named[0]!.unit,
            confidence,
          ),
        )
  const few = curves.find(({ present, absent }) => tooFew(present, absent))
  const comparisons = few
    ? []
    : compare.design === 'paired'
      ? pairedComparisons(curves, subjects, compare, confidence, onProgress)
      : [independentComparison(curves, confidence)]
  return {
    kind: 'comparison',
    analyteName: named.map((each) => each.name).join(', '),
    unit: named[0]!.unit,
    counts: compare.design === 'paired' ? counts : inGroups(counts, curves, subjects, compare),
    curves: curves.map(({ values: _values, ...curve }) => curve),
    areaWithheld: few ? `${few.label}: ${withheldSentence(few.present, few.absent)}` : null,
    comparisons,
  }
}

function curveOf(
  subjects: readonly CompleteSubject[],
  at: number,
  direction: Direction,
  label: string,
  unit: string,
  confidence: number,
): Compared {
  const valuesOf = (present: boolean) =>
    subjects.filter((each) => each.present === present).map((each) => each.values[at]!)
  const values = { present: valuesOf(true), absent: valuesOf(false) }
  if (values.present.length === 0 || values.absent.length === 0)
    throw new StatisticsError(
      'one-class',
      `${label}: everybody counted has the same reference outcome, so there is nothing to tell apart.`,
    )
  const curve = rocCurve({ ...values, direction })
  const { nPresent: present, nAbsent: absent } = curve
  const withoutClusters = { ...values, presentSubjects: null, absentSubjects: null }
  const area = tooFew(present, absent)
    ? null
    : areaEstimateOf({ ...withoutClusters, counts: NO_COUNTS }, curve, { confidence })
  return { label, unit, direction, present, absent, area, curve: storedCurveOf(curve), values }
}

/** Areas hang on values alone. */
const NO_COUNTS = {
  subjects: 0,
  present: 0,
  absent: 0,
  values: 0,
  severalSessions: 0,
  belowLod: 0,
  leftOut: [],
}

function pairedComparisons(
  curves: readonly Compared[],
  subjects: readonly CompleteSubject[],
  { adjust, permutations }: Paired,
  level: number,
  onProgress?: (share: number) => void,
): Comparison[] {
  const pairs = curves.flatMap((_, first) =>
    curves.slice(first + 1).map((_each, more) => [first, first + 1 + more] as const),
  )
  const found = pairs.map(([first, second], at): Comparison => {
    const one = curves[first]!
    const other = curves[second]!
    const test = pairedDelong(
      { ...one.values, direction: one.direction },
      { ...other.values, direction: other.direction },
      { level },
    )
    const column = (place: number) =>
      subjects.map(({ values }) => upwards(values[place]!, curves[place]!.direction))
    return {
      first,
      second,
      difference: {
        estimate: test.difference,
        lower: test.interval?.lower ?? null,
        upper: test.interval?.upper ?? null,
        method: METHODS.delong.name,
        note: test.notDefined?.sentence ?? null,
      },
      statistic: test.z,
      degreesOfFreedom: null,
      p: test.p,
      pAdjusted: null,
      permutation:
        permutations &&
        venkatramanTest(
          {
            first: column(first),
            second: column(second),
            present: subjects.map((each) => each.present),
          },
          {
            ...permutations,
            onProgress: (share) => onProgress?.((at + share) / pairs.length),
          },
        ),
    }
  })
  return adjust && found.length > 1 ? adjusted(found) : found
}

/** The test of curves wants markers that all point upwards. */
const upwards = (value: number, direction: Direction) => (direction === 'higher' ? value : -value)

/** Holm over the p values that there are. */
function adjusted(comparisons: Comparison[]): Comparison[] {
  const known = comparisons.filter((each) => each.p !== null)
  const values = holmAdjustment(known.map((each) => each.p!))
  return comparisons.map((each) => ({
    ...each,
    pAdjusted: each.p === null ? null : values[known.indexOf(each)]!,
  }))
}

function independentComparison(curves: readonly Compared[], level: number): Comparison {
  const [one, other] = curves.map(({ values, direction }) => rocCurve({ ...values, direction }))
  const test: IndependentAreas = independentAreas(one!, other!, { level })
  return {
    first: 0,
    second: 1,
    difference: {
      estimate: test.difference,
      lower: test.interval?.lower ?? null,
      upper: test.interval?.upper ?? null,
      method: METHODS.delong.name,
      note: test.notDefined?.sentence ?? null,
    },
    statistic: test.statistic,
    degreesOfFreedom: test.degreesOfFreedom,
    p: test.pT,
    pAdjusted: null,
    permutation: null,
  }
}

function groupOf({ subject }: CompleteSubject, by: Independent['by']): string | null {
  if (by.kind === 'covariate') {
    const value = subject.covariates[by.name]
    return value === undefined ? null : String(value)
  }
  return subject[by.kind]
}

const groupLabel = (by: Independent['by'], group: string): string =>
  `${by.kind === 'covariate' ? by.name : SUBGROUPING_LABELS[by.kind]} ${group}`

/** Subjects of neither group are left out too. */
function inGroups(
  counts: ComparisonResult['counts'],
  curves: readonly Compared[],
  subjects: readonly CompleteSubject[],
  { groups, by }: Independent,
): ComparisonResult['counts'] {
  const outside = subjects.filter((each) => !groups.includes(groupOf(each, by) ?? '')).length
  const sum = (of: 'present' | 'absent') => curves.reduce((all, each) => all + each[of], 0)
  return {
    ...counts,
    present: sum('present'),
    absent: sum('absent'),
    values: counts.values - outside,
    leftOut:
      outside === 0
        ? counts.leftOut
        : [...counts.leftOut, { reason: 'inNeitherGroup', subjects: outside }],
  }
}
