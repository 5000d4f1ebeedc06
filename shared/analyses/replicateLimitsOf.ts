import { group } from 'd3-array'
import type { AgreementFigures, AgreementParameters } from '#shared/schemas/agreement.ts'
import { AGREEMENT_METHODS } from '#shared/statistics/agreement/AGREEMENT_METHODS.ts'
import { limitsOfDifferences } from '#shared/statistics/agreement/limitsOfDifferences.ts'
import type { MoverLimits } from '#shared/statistics/agreement/moverLimits.ts'
import { replicateLimitsConstant } from '#shared/statistics/agreement/replicateLimitsConstant.ts'
import { replicateLimitsVarying } from '#shared/statistics/agreement/replicateLimitsVarying.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { backFromLogs, type LimitLines } from './agreementLimitsOf.ts'
import type { AgreementPairs } from './agreementPairs.ts'

type At = Pick<AgreementParameters, 'scale' | 'trueValue' | 'confidence'>
type Subject = { first: number[]; second: number[] }
type Found = LimitLines & { replicates: NonNullable<AgreementFigures['replicates']> }

/**
 * Limits of agreement for single sessions where subjects have several: each subject is one cluster,
 * and the spread within and between subjects both count.
 * @throws StatisticsError too-few (fewer than 3 subjects), not-positive (ratio), out-of-range (a scale
 * for which there is no such method)
 */
export function replicateLimitsOf(pairs: AgreementPairs, at: At): Found {
  if (at.scale !== 'difference' && at.scale !== 'ratio')
    throw new StatisticsError(
      'out-of-range',
      'With every session of a subject, limits are given for differences and for ratios. Choose one of these, or one value for each subject.',
    )
  const subjects = subjectsOf(at.scale === 'ratio' ? inLogs(pairs) : pairs)
  if (subjects.length < 3)
    throw new StatisticsError(
      'too-few',
      `Limits of agreement need at least 3 subjects; there are ${subjects.length}.`,
    )
  const found = at.trueValue === 'varying' ? varying(subjects, at) : constant(subjects, at)
  const { replicates, ...lines } = found
  return { ...(at.scale === 'ratio' ? backFromLogs(lines) : lines), replicates }
}

function varying(subjects: Subject[], { confidence: level }: At): Found {
  const found = replicateLimitsVarying(subjects, { level })
  const { mover } = found
  return {
    ...linesOf(mover, mover.bias, subjects, level),
    limitsMethod: AGREEMENT_METHODS.varying.name,
    replicates: {
      trueValue: 'varying',
      subjects: found.subjects,
      pairs: found.pairs,
      withinDifferences: Math.sqrt(found.withinVariance),
      withinSensor: null,
      withinReference: null,
    },
  }
}

function constant(subjects: Subject[], { confidence: level }: At): Found {
  const found = replicateLimitsConstant(subjects, { level })
  const root = (square: number | null) => (square === null ? null : Math.sqrt(square))
  return {
    ...linesOf(found, found.bias, subjects, level),
    limitsMethod: AGREEMENT_METHODS.constant.name,
    replicates: {
      trueValue: 'constant',
      subjects: found.subjects,
      pairs: subjects.reduce((sum, { first }) => sum + first.length, 0),
      withinDifferences: null,
      withinSensor: root(found.meanSquareWithinFirst),
      withinReference: root(found.meanSquareWithinSecond),
    },
  }
}

function linesOf(mover: MoverLimits, bias: number, subjects: Subject[], level: number) {
  const { biasInterval } = limitsOfDifferences(subjects.map(meanDifference), { level })
  return {
    bias: { estimate: bias, ...biasInterval, slope: 0 },
    sd: mover.sd,
    lowerLimit: { estimate: mover.lower, ...mover.lowerInterval, slope: 0 },
    upperLimit: { estimate: mover.upper, ...mover.upperInterval, slope: 0 },
    centre: null,
    alongMean: [],
    biasMethod: AGREEMENT_METHODS.tSubjects.name,
  }
}

const meanDifference = ({ first, second }: Subject): number =>
  first.reduce((sum, value, at) => sum + value - second[at]!, 0) / first.length

function subjectsOf({ sensor, reference, subjects }: Readings): Subject[] {
  const byCode = group(subjects.keys(), (at) => subjects[at]!)
  return [...byCode.values()].map((places) => ({
    first: places.map((at) => sensor[at]!),
    second: places.map((at) => reference[at]!),
  }))
}

type Readings = Pick<AgreementPairs, 'sensor' | 'reference' | 'subjects'>

function inLogs({ sensor, reference, subjects }: Readings): Readings {
  const at = sensor.findIndex((value, place) => value <= 0 || reference[place]! <= 0)
  if (at >= 0)
    throw new StatisticsError(
      'not-positive',
      `A ratio needs values above 0; pair ${at + 1} has one that is not.`,
    )
  return { sensor: sensor.map(Math.log), reference: reference.map(Math.log), subjects }
}
