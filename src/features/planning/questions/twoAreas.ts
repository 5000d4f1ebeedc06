import type { PilotComparison } from '#shared/statistics/planning/PilotComparison.ts'
import { twoAreasPower } from '#shared/statistics/planning/twoAreasPower.ts'
import { twoAreasSampleSize } from '#shared/statistics/planning/twoAreasSampleSize.ts'
import { formatCount, formatEstimate } from '#shared/terms/numbers.ts'
import { type EnrolmentAssumptions, enrolmentNote } from '../enrolment.ts'
import type { PlanWork } from '../planQuestion.ts'
import { classFigures, classWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'
import { powersShown } from './areaAgainst.ts'

export type TwoAreasValues = EnrolmentAssumptions & {
  area1: number
  area2: number
  power: number
  alpha: number
  reach: number | undefined
}

type TwoAreasPlan = {
  values: TwoAreasValues
  /** The comparison as planned, with another second area where one is given. */
  pilot: (area2?: number) => PilotComparison
  /** "with both measured in each", "in each of the two groups". */
  where: string
  /** Groups of subjects, each of the numbers given. */
  groups: 1 | 2
}

/** Two areas, by the variances that a pilot or a binormal model gives. */
export function twoAreas({ values, pilot, where, groups }: TwoAreasPlan): PlanWork {
  const { area1, area2, power, alpha, reach } = values
  const size = twoAreasSampleSize(pilot(), { power, alpha })
  const all = { present: groups * size.present, absent: groups * size.absent }
  const powers = [...new Set([0.8, 0.85, 0.9, 0.95, power])].sort((a, b) => a - b)
  return {
    answer: {
      sentence: `To show that areas of ${area1} and ${area2} differ, with power ${power} at a two-sided significance level of ${alpha}, the study needs ${classWords(size)}, ${where}.`,
      figures: [
        ...classFigures(size).slice(0, 2),
        { label: 'in all', value: formatCount(all.present + all.absent) },
      ],
      notes: [...reachNote(pilot(), reach, alpha), ...enrolmentNote(all, values)],
      table: {
        caption: 'Subjects by power',
        columns: [
          { header: 'Power' },
          { header: 'Present', numeric: true },
          { header: 'Absent', numeric: true },
        ],
        rows: powers.map((each) => {
          const { present, absent } = twoAreasSampleSize(pilot(), { power: each, alpha })
          return [String(each), formatCount(present), formatCount(absent)]
        }),
      },
    },
    curve: {
      title: 'Subjects with the condition against the second area',
      x: { label: 'Second area', kind: 'linear', format: 'proportion' },
      y: { label: 'Subjects with the condition', kind: 'log', format: 'count' },
      lines: powersShown(power).map((each) => ({
        label: `Power ${each}`,
        points: sampleCurve(
          area1 + 0.5 * (area2 - area1),
          Math.min(0.99, Math.max(0.5, area1 + 1.8 * (area2 - area1))),
          (other) => twoAreasSampleSize(pilot(other), { power: each, alpha }).present,
        ),
      })),
      mark: { x: area2, y: size.present, label: formatCount(size.present) },
    },
  }
}

function reachNote(pilot: PilotComparison, reach: number | undefined, alpha: number): string[] {
  if (reach === undefined) return []
  const absent = Math.ceil((reach * pilot.nAbsent) / pilot.nPresent - 1e-9)
  const power = twoAreasPower(pilot, { alpha, nPresent: reach })
  return [`With ${classWords({ present: reach, absent })} the power is ${formatEstimate(power)}.`]
}

/** Two equal areas have no difference to find. */
export const refuseEqualAreas = ({ area1, area2 }: { area1: number; area2: number }) =>
  area1 === area2 ? { area2: 'The two areas are the same, so there is no difference to find.' } : {}
