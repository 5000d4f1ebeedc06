import { sortedOrder } from '../description/sortedOrder.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import { percentileInterval } from '../random/percentileInterval.ts'
import type { Resampling } from '../random/Resampling.ts'
import { randomStream } from '../random/randomStream.ts'
import { requireCount } from '../requireCount.ts'
import { requireProbability } from '../requireProbability.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { ClusteredClasses } from './clusteredArea.ts'

export type BootstrapClusteredArea = Interval & {
  standardError: number
  replicates: number
  seed: number
  method: 'bootstrap of subjects, percentile'
}

/** Values sorted from smallest to largest as runs of ties, each with its subject and outcome. */
type SortedValues = { subject: Int32Array; isPresent: Uint8Array; endOfTie: Uint8Array }

/**
 * Percentile interval of the area from a bootstrap of whole subjects with all their sessions, drawn
 * within strata of subjects that have the same outcomes (present only, absent only, both).
 * @throws StatisticsError 'one-class', 'unequal-length', 'non-finite', 'out-of-range'
 * Source: Rutter 2000, Acad Radiol 7:413.
 */
export function bootstrapClusteredArea(
  classes: ClusteredClasses,
  { level = 0.95, seed, replicates = 2000, onProgress }: LevelOption & Resampling,
): BootstrapClusteredArea {
  requireCount(replicates, 'The number of replicates', 2)
  requireProbability(level, 'The confidence level')
  const { sorted, strata, subjects } = prepare(classes)
  const random = randomStream(seed)
  const weight = new Int32Array(subjects)
  const areas = new Float64Array(replicates)
  for (let r = 0; r < replicates; r++) {
    weight.fill(0)
    for (const stratum of strata) {
      const n = stratum.length
      for (let i = 0; i < n; i++) weight[stratum[Math.floor(random() * n)]!]!++
    }
    areas[r] = weightedArea(sorted, weight)
    if (r % 100 === 99) onProgress?.((r + 1) / replicates)
  }
  const method = 'bootstrap of subjects, percentile' as const
  return { ...percentileInterval(areas, level), replicates, seed, method }
}

function prepare(classes: ClusteredClasses) {
  const { present, absent, direction, presentSubjects, absentSubjects } = classes
  const m = present.length
  const n = absent.length
  if (m === 0 || n === 0) throw new StatisticsError('one-class', 'Both outcomes are needed.')
  if (m !== presentSubjects.length || n !== absentSubjects.length) {
    throw new StatisticsError('unequal-length', 'Each value needs the subject that it came from.')
  }
  const sign = direction === 'higher' ? 1 : -1
  const values = new Float64Array(m + n)
  for (let i = 0; i < m; i++) values[i] = sign * present[i]!
  for (let j = 0; j < n; j++) values[m + j] = sign * absent[j]!
  const numberOf = new Map<string | number, number>()
  const outcomes: number[] = []
  const subjectOf = (index: number): number => {
    const subject = index < m ? presentSubjects[index]! : absentSubjects[index - m]!
    const number = numberOf.get(subject) ?? numberOf.size
    numberOf.set(subject, number)
    outcomes[number] = (outcomes[number] ?? 0) | (index < m ? 1 : 2)
    return number
  }
  const order = sortedOrder(values, 'The values')
  const sorted: SortedValues = {
    subject: new Int32Array(m + n),
    isPresent: new Uint8Array(m + n),
    endOfTie: new Uint8Array(m + n),
  }
  order.forEach((index, k) => {
    sorted.subject[k] = subjectOf(index)
    sorted.isPresent[k] = index < m ? 1 : 0
    const next = order[k + 1]
    sorted.endOfTie[k] = next === undefined || values[next] !== values[index] ? 1 : 0
  })
  const strata = [1, 2, 3].map((outcome) =>
    Int32Array.from(outcomes.flatMap((mask, subject) => (mask === outcome ? [subject] : []))),
  )
  return { sorted, strata, subjects: outcomes.length }
}

function weightedArea({ subject, isPresent, endOfTie }: SortedValues, weight: Int32Array): number {
  let absentBelow = 0
  let tiedPresent = 0
  let tiedAbsent = 0
  let present = 0
  let twiceWins = 0
  for (let k = 0; k < subject.length; k++) {
    const w = weight[subject[k]!]!
    if (isPresent[k] === 1) tiedPresent += w
    else tiedAbsent += w
    if (endOfTie[k] === 1) {
      twiceWins += tiedPresent * (2 * absentBelow + tiedAbsent)
      absentBelow += tiedAbsent
      present += tiedPresent
      tiedPresent = 0
      tiedAbsent = 0
    }
  }
  return twiceWins / (2 * present * absentBelow)
}
