import { areaPower } from '#shared/statistics/planning/areaPower.ts'
import { areaSampleSize } from '#shared/statistics/planning/areaSampleSize.ts'
import { formatCount, formatEstimate } from '#shared/terms/numbers.ts'
import { type EnrolmentAssumptions, enrolmentNote } from '../enrolment.ts'
import type { PlanWork } from '../planQuestion.ts'
import { classFigures, classWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

export type AreaAgainstValues = EnrolmentAssumptions & {
  expected: number
  power: number
  alpha: number
  absentPerPresent: number
  reach: number | undefined
}

type Row = { name: string; present: number; absent: number }

/** One area against a value to be excluded: the numbers by every published method, and their curve. */
export function areaAgainst(
  values: AreaAgainstValues,
  excluded: number,
  moreRows: readonly Row[] = [],
): PlanWork {
  const { expected, power, alpha, absentPerPresent } = values
  const plan = { alternative: expected, null: excluded, power, alpha, absentPerPresent }
  const { finite, asymptotic, binormal } = areaSampleSize(plan)
  const rows: Row[] = [
    { name: 'Hanley & McNeil, full formula', ...finite },
    { name: 'Hanley & McNeil, large samples', ...asymptotic },
    { name: 'Binormal variance, Obuchowski', ...binormal },
    ...moreRows,
  ]
  return {
    answer: {
      sentence: `To show an area above ${excluded} when it is ${expected}, with power ${power} at a two-sided significance level of ${alpha}, the study needs ${classWords(finite)}.`,
      figures: classFigures(finite),
      notes: [
        `At these numbers the power is ${formatEstimate(finite.power)}.`,
        ...largerNote(rows, finite.present),
        ...reachNote(values, excluded),
        ...enrolmentNote(finite, values),
      ],
      table: {
        caption: 'Subjects by method',
        columns: [
          { header: 'Method' },
          { header: 'Present', numeric: true },
          { header: 'Absent', numeric: true },
          { header: 'In all', numeric: true },
        ],
        rows: rows.map(({ name, present, absent }) => [
          name,
          formatCount(present),
          formatCount(absent),
          formatCount(present + absent),
        ]),
      },
    },
    curve: {
      title: 'Subjects with the condition against the expected area',
      x: { label: 'Expected area', kind: 'linear', format: 'proportion' },
      y: { label: 'Subjects with the condition', kind: 'log', format: 'count' },
      lines: powersShown(power).map((each) => ({
        label: `Power ${each}`,
        points: sampleCurve(
          excluded + 0.4 * (expected - excluded),
          Math.min(0.99, excluded + 1.8 * (expected - excluded)),
          (alternative) => areaSampleSize({ ...plan, alternative, power: each }).finite.present,
        ),
      })),
      mark: { x: expected, y: finite.present, label: formatCount(finite.present) },
    },
  }
}

/** The power planned first, and the usual ones beside it. */
export const powersShown = (power: number): number[] => [
  power,
  ...[0.8, 0.9].filter((usual) => usual !== power),
]

function largerNote(rows: readonly Row[], planned: number): string[] {
  const largest = rows.reduce((most, row) => (row.present > most.present ? row : most))
  if (largest.present <= planned) return []
  return [
    `${largest.name} asks for ${formatCount(largest.present)} and ${formatCount(largest.absent)}: the safer number where the values of the classes are about normal, perhaps after a transformation.`,
  ]
}

function reachNote(values: AreaAgainstValues, excluded: number): string[] {
  const { reach, expected, alpha, absentPerPresent } = values
  if (reach === undefined) return []
  const nAbsent = Math.ceil(absentPerPresent * reach - 1e-9)
  const power = areaPower({
    alternative: expected,
    null: excluded,
    alpha,
    nPresent: reach,
    nAbsent,
  })
  return [
    `With ${classWords({ present: reach, absent: nAbsent })} the power is ${formatEstimate(power)}.`,
  ]
}
