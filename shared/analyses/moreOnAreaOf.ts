import type { MoreOnArea } from '#shared/schemas/accuracyMore.ts'
import type { AreaEstimate } from '#shared/schemas/estimate.ts'
import { binormalArea } from '#shared/statistics/accuracy/binormalArea.ts'
import { binormalCurve } from '#shared/statistics/accuracy/binormalCurve.ts'
import { hanleyMcNeilError } from '#shared/statistics/accuracy/hanleyMcNeilError.ts'
import { mannWhitney } from '#shared/statistics/accuracy/mannWhitney.ts'
import { partialArea } from '#shared/statistics/accuracy/partialArea.ts'
import type { RocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { testAgainstHalf } from '#shared/statistics/accuracy/testAgainstHalf.ts'
import type { AccuracyValues } from './accuracyValues.ts'

type Range = { from: number; to: number }
type Figure = MoreOnArea['figures'][number]

const INDEPENDENT_ONLY =
  'Hanley–McNeil, Mann–Whitney and binormal areas take every value as another subject, so they are left out where subjects have several sessions.'

/** Tests of the area, its part between two specificities, and other ways to estimate it. */
export function moreOnAreaOf(
  { present, absent, presentSubjects }: AccuracyValues,
  curve: RocCurve,
  area: AreaEstimate,
  range: Range,
): MoreOnArea {
  const figures = [againstHalf(area), ...partFigures(curve, range)]
  if (presentSubjects) return { figures, note: INDEPENDENT_ONLY }
  return {
    figures: [...figures, ...simpleFigures(curve, area), ...binormal(curve, present, absent)],
    note: null,
  }
}

function againstHalf({ estimate, standardError }: AreaEstimate): Figure {
  const { z, p, notDefined } = testAgainstHalf({ area: estimate, standardError })
  return {
    key: 'testAgainstHalf',
    label: 'Test of the area against 0.5, z',
    value: z,
    p,
    method: 'area less 0.5 over its standard error, normal',
    source: 'DeLong, DeLong & Clarke-Pearson 1988, Biometrics 44:837',
    note: notDefined?.sentence ?? null,
  }
}

function partFigures(curve: RocCurve, range: Range): Figure[] {
  const { raw, corrected, notDefined } = partialArea(curve, range)
  const between = `specificity ${range.from} to ${range.to}`
  return [
    {
      key: 'partialArea',
      label: `Partial area, ${between}`,
      value: raw,
      p: null,
      method: 'trapezoids, cut straight at the ends',
      source: 'McClish 1989, Med Decis Making 9:190',
      note: null,
    },
    {
      key: 'partialAreaCorrected',
      label: 'The same on the scale of 0.5 (chance) to 1',
      value: corrected,
      p: null,
      method: 'standardised (McClish)',
      source: 'McClish 1989, Med Decis Making 9:190',
      note: notDefined?.sentence ?? null,
    },
  ]
}

function simpleFigures(curve: RocCurve, { estimate: area }: AreaEstimate): Figure[] {
  const { nPresent, nAbsent } = curve
  const test = mannWhitney(curve)
  return [
    {
      key: 'hanleyMcNeil',
      label: 'Standard error from the area and the class sizes alone',
      value: hanleyMcNeilError({ area, nPresent, nAbsent }),
      p: null,
      method: 'Hanley–McNeil',
      source: 'Hanley & McNeil 1982, Radiology 143:29',
      note: null,
    },
    {
      key: 'mannWhitney',
      label: 'Pairs in order (U)',
      value: test.uInDirection,
      p: test.p,
      method: 'Mann–Whitney, normal approximation with ties',
      source: 'Mann & Whitney 1947, Ann Math Stat 18:50',
      note: test.notDefined?.sentence ?? null,
    },
  ]
}

function binormal(curve: RocCurve, present: number[], absent: number[]): Figure[] {
  const smooth = binormalCurve(curve)
  const moments = binormalArea({ present, absent, direction: curve.direction })
  const byMoments = {
    p: null,
    method: 'two normal distributions',
    source: 'Faraggi & Reiser 2002, Stat Med 21:3093',
  }
  const reason = (value: number | null) =>
    value === null ? (moments.notDefined?.sentence ?? null) : null
  return [
    {
      key: 'binormalCurve',
      label: 'Area of a smooth binormal curve through the points',
      value: smooth.area,
      p: null,
      method: 'least squares on probit scales',
      source: 'Hanley 1988, Med Decis Making 8:197',
      note: smooth.notDefined?.sentence ?? null,
    },
    {
      key: 'binormalRaw',
      label: 'Area if both classes were normal',
      value: moments.raw,
      ...byMoments,
      note: reason(moments.raw),
    },
    {
      key: 'binormalLog',
      label: 'Area if their logarithms were normal',
      value: moments.log,
      ...byMoments,
      note: reason(moments.log),
    },
  ]
}
