import { zFor } from '../distributions/zFor.ts'
import type { Interval, LevelOption } from '../Interval.ts'
import type { NotDefined } from '../NotDefined.ts'
import { StatisticsError } from '../StatisticsError.ts'
import type { Classes } from './Classes.ts'
import { newcombeAreaInterval } from './newcombeAreaInterval.ts'
import { placements } from './placements.ts'

/** Classes with, for each value, the subject it came from. */
export type ClusteredClasses = Classes & {
  presentSubjects: ArrayLike<string | number>
  absentSubjects: ArrayLike<string | number>
}

export type ClusteredArea = {
  nPresent: number
  nAbsent: number
  /** Subjects with at least one value in the class, and subjects in all. */
  subjectsPresent: number
  subjectsAbsent: number
  subjects: number
  area: number
  variance: number | null
  standardError: number | null
  plain: Interval | null
  plainUncut: Interval | null
  notEstimable: NotDefined | null
  shown: Interval & { method: 'Obuchowski, subjects as clusters' | 'Newcombe, method 5' }
}

type Cluster = { present: number; absent: number; sumPresent: number; sumAbsent: number }

/**
 * Area under the ROC curve where subjects may have several sessions: each subject is one cluster, and
 * values of one subject may carry either outcome. Equal to delongArea where each subject has one value.
 * @throws StatisticsError 'one-class', 'non-finite', 'unequal-length'
 * Source: Obuchowski 1997, Biometrics 53:567.
 */
export function clusteredArea(
  classes: ClusteredClasses,
  { level = 0.95 }: LevelOption = {},
): ClusteredArea {
  const { present, absent, presentSubjects, absentSubjects } = classes
  if (present.length !== presentSubjects.length || absent.length !== absentSubjects.length) {
    throw new StatisticsError('unequal-length', 'Each value needs the subject that it came from.')
  }
  const { area, ofPresent, ofAbsent } = placements(classes)
  const clusters = gather(classes, ofPresent, ofAbsent)
  const subjectsPresent = clusters.filter((c) => c.present > 0).length
  const subjectsAbsent = clusters.filter((c) => c.absent > 0).length
  const m = present.length
  const n = absent.length
  const variance =
    subjectsPresent < 2 || subjectsAbsent < 2
      ? null
      : obuchowskiVariance(clusters, { area, m, n, subjectsPresent, subjectsAbsent })
  const standardError = variance === null ? null : Math.sqrt(variance)
  const plainUncut = standardError === null ? null : around(area, zFor(level) * standardError)
  const plain = plainUncut && {
    lower: Math.max(0, plainUncut.lower),
    upper: Math.min(1, plainUncut.upper),
  }
  const notEstimable = reason(variance)
  const sizes = { area, nPresent: subjectsPresent, nAbsent: subjectsAbsent }
  return {
    nPresent: m,
    nAbsent: n,
    subjectsPresent,
    subjectsAbsent,
    subjects: clusters.length,
    area,
    variance,
    standardError,
    plain,
    plainUncut,
    notEstimable,
    shown:
      notEstimable === null && plain !== null
        ? { ...plain, method: 'Obuchowski, subjects as clusters' }
        : { ...newcombeAreaInterval(sizes, { level }), method: 'Newcombe, method 5' },
  }
}

function gather(
  { presentSubjects, absentSubjects }: ClusteredClasses,
  ofPresent: Float64Array,
  ofAbsent: Float64Array,
): Cluster[] {
  const bySubject = new Map<string | number, Cluster>()
  const clusterOf = (subject: string | number): Cluster => {
    const known = bySubject.get(subject)
    if (known) return known
    const fresh = { present: 0, absent: 0, sumPresent: 0, sumAbsent: 0 }
    bySubject.set(subject, fresh)
    return fresh
  }
  for (let i = 0; i < ofPresent.length; i++) {
    const cluster = clusterOf(presentSubjects[i]!)
    cluster.present += 1
    cluster.sumPresent += ofPresent[i]!
  }
  for (let j = 0; j < ofAbsent.length; j++) {
    const cluster = clusterOf(absentSubjects[j]!)
    cluster.absent += 1
    cluster.sumAbsent += ofAbsent[j]!
  }
  return [...bySubject.values()]
}

function obuchowskiVariance(
  clusters: Cluster[],
  sizes: { area: number; m: number; n: number; subjectsPresent: number; subjectsAbsent: number },
): number {
  const { area, m, n, subjectsPresent, subjectsAbsent } = sizes
  let s10 = 0
  let s01 = 0
  let s11 = 0
  for (const cluster of clusters) {
    const a = cluster.sumPresent - cluster.present * area
    const b = cluster.sumAbsent - cluster.absent * area
    s10 += a * a
    s01 += b * b
    s11 += a * b
  }
  s10 *= subjectsPresent / ((subjectsPresent - 1) * m)
  s01 *= subjectsAbsent / ((subjectsAbsent - 1) * n)
  s11 *= clusters.length / (clusters.length - 1)
  return Math.max(0, s10 / m + s01 / n + (2 * s11) / (m * n))
}

function around(centre: number, half: number): Interval {
  return { lower: centre - half, upper: centre + half }
}

function reason(variance: number | null): NotDefined | null {
  if (variance === null) {
    return { code: 'too-few', sentence: 'The variance needs at least two subjects in each class.' }
  }
  // below this a standard error is rounding, not spread
  if (variance > 1e-25) return null
  return {
    code: 'zero-variance',
    sentence:
      'Every subject stands alike to the other class, so the variance is 0 and says nothing about precision. The interval shown is Newcombe’s.',
  }
}
