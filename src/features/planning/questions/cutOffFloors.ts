import {
  type FloorSampleSize,
  floorSampleSize,
} from '#shared/statistics/planning/floorSampleSize.ts'
import type { ProportionMethod } from '#shared/statistics/proportions/proportionEstimate.ts'
import { formatCount, formatEstimate, formatFraction } from '#shared/terms/numbers.ts'
import type { EntryValues } from '../../../forms/entries.ts'
import { enrolmentNote } from '../enrolment.ts'
import { ENROLMENT, LEVEL, POWER, shareEntry } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { classFigures, classWords, levelWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

const entries = {
  sensitivity: shareEntry({ label: 'Expected sensitivity', start: '0.9' }),
  sensitivityFloor: shareEntry({
    label: 'Floor of sensitivity',
    start: '0.8',
    hint: 'To be cleared',
  }),
  specificity: shareEntry({ label: 'Expected specificity', start: '0.85' }),
  specificityFloor: shareEntry({
    label: 'Floor of specificity',
    start: '0.75',
    hint: 'To be cleared',
  }),
  power: { ...POWER, hint: 'Of each measure by itself' },
  level: LEVEL,
  ...ENROLMENT,
}
type Values = EntryValues<typeof entries>

/** The curve takes most of the time; so many points are enough for a smooth line. */
const STEPS = 16
const WILSON: ProportionMethod = 'Wilson'
const EXACT: ProportionMethod = 'Clopper–Pearson'

export const cutOffFloors = planQuestion({
  ask: 'floors',
  label: 'Above floors',
  title: 'Are sensitivity and specificity above their floors?',
  lead: 'A success criterion with both measures co-primary: the lower end of the interval of each has to lie above its floor, at a cut-off that the plan fixes beforehand.',
  entries,
  more: ['prevalence', 'withoutResult'],
  methods: ['exactFloor', 'wilson', 'clopperPearson', 'coPrimary'],
  blamed: 'sensitivityFloor',
  slow: true,
  refuse: ({ sensitivity, sensitivityFloor, specificity, specificityFloor }) => ({
    ...(sensitivityFloor >= sensitivity
      ? { sensitivityFloor: 'The floor lies below the expected sensitivity. Lower it.' }
      : {}),
    ...(specificityFloor >= specificity
      ? { specificityFloor: 'The floor lies below the expected specificity. Lower it.' }
      : {}),
  }),
  work: (values, onProgress) => {
    const steps = stepper(2 * (2 + STEPS + 1), onProgress)
    const sized = (
      measure: Measure,
      expected = measure.expected,
      interval: ProportionMethod = WILSON,
    ) => {
      const { floor } = measure
      const { power, level } = values
      return steps(() => floorSampleSize({ expected, floor, power, level, interval }))
    }
    const [sensitivity, specificity] = measuresOf(values)
    const first = sized(sensitivity)
    const second = sized(specificity)
    const needed = { present: first.n, absent: second.n }
    const rows = [
      row(sensitivity, WILSON, first),
      row(sensitivity, EXACT, sized(sensitivity, sensitivity.expected, EXACT)),
      row(specificity, WILSON, second),
      row(specificity, EXACT, sized(specificity, specificity.expected, EXACT)),
    ]
    const lines = [sensitivity, specificity].map((measure) => ({
      label: `${measure.name}, floor ${measure.floor}`,
      points: sampleCurve(
        measure.floor + 0.5 * (measure.expected - measure.floor),
        measure.expected + 0.6 * (1 - measure.expected),
        (expected) => sized(measure, expected).n,
        STEPS,
      ),
    }))
    return {
      answer: {
        sentence: `To show a sensitivity above ${sensitivity.floor} when it is ${sensitivity.expected} and a specificity above ${specificity.floor} when it is ${specificity.expected} (lower ends of ${levelWords(values.level)} Wilson intervals, power ${values.power} each), the study needs ${classWords(needed)}.`,
        figures: classFigures(needed),
        notes: [
          `Success then takes ${formatFraction(first.least, first.n)} positives with the condition and ${formatFraction(second.least, second.n)} negatives without. The power for both together is ${formatEstimate(first.power * second.power)}: raise the power of each where that is too little.`,
          'The exact power rises in a saw-tooth: from these numbers on it no longer falls below the power wanted.',
          ...enrolmentNote(needed, values),
        ],
        table: {
          caption: 'Subjects by measure and interval',
          columns: [
            { header: 'Measure, interval' },
            { header: 'Subjects', numeric: true },
            { header: 'To succeed', numeric: true },
            { header: 'Power', numeric: true },
            { header: 'First to reach it', numeric: true },
          ],
          rows,
        },
      },
      curve: {
        title: 'Subjects of its class against the expected measure',
        x: { label: 'Expected sensitivity or specificity', kind: 'linear', format: 'proportion' },
        y: { label: 'Subjects of its class', kind: 'log', format: 'count' },
        lines,
        mark: { x: sensitivity.expected, y: first.n, label: formatCount(first.n) },
      },
    }
  },
})

type Measure = { name: string; expected: number; floor: number }

const measuresOf = (values: Values): [Measure, Measure] => [
  { name: 'Sensitivity', expected: values.sensitivity, floor: values.sensitivityFloor },
  { name: 'Specificity', expected: values.specificity, floor: values.specificityFloor },
]

function row({ name }: Measure, interval: ProportionMethod, size: FloorSampleSize): string[] {
  return [
    `${name}, ${interval}`,
    formatCount(size.n),
    formatFraction(size.least, size.n),
    formatEstimate(size.power),
    formatCount(size.firstToReach),
  ]
}

/** Runs steps one by one and tells the share of them that is done. */
function stepper(all: number, onProgress?: (share: number) => void) {
  let done = 0
  return <T>(step: () => T): T => {
    try {
      return step()
    } finally {
      done += 1
      onProgress?.(done / all)
    }
  }
}
