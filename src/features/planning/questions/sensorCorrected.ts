import { correctedArea } from '#shared/statistics/sensor/correctedArea.ts'
import { formatEstimate } from '#shared/terms/numbers.ts'
import { notNegativeEntry, positiveEntry, shareEntry } from '../planEntries.ts'
import { type PlanWork, planQuestion } from '../planQuestion.ts'
import { sampleCurve } from '../sampleCurve.ts'

const OBSERVED = shareEntry({ label: 'Area as seen', start: '0.8' })
const SECONDARY =
  'The area as seen stays the result of a study; this one is secondary, and its interval needs a bootstrap that takes in the study of reliability.'
const LEAD =
  'What the area of a pilot would have been with a sensor free of noise, for values that are about normal.'

export const sensorCorrected = planQuestion({
  ask: 'corrected',
  label: 'Area freed of noise',
  title: 'What would the area be without noise, by the reliability?',
  lead: `${LEAD} Reliability is that within a class: the pooled one is too high and corrects too little.`,
  entries: {
    observed: OBSERVED,
    reliability: {
      label: 'Reliability',
      start: '0.7',
      hint: 'Of the value that was analysed, within a class',
      optional: false,
      refuse: (value: number) =>
        value > 0 && value <= 1 ? null : 'Above 0 and at most 1, such as 0.7.',
    },
  },
  methods: ['correctedArea'],
  blamed: 'reliability',
  work: ({ observed, reliability }) =>
    freed({
      observed,
      corrected: correctedArea(observed, { reliability }),
      because: `a reliability of ${reliability}`,
      rows: [0.5, 0.6, 0.7, 0.8, 0.9, 1].map((each) => [
        `Reliability ${each}`,
        formatEstimate(correctedArea(observed, { reliability: each })),
      ]),
      curve: {
        x: { label: 'Reliability', kind: 'linear', format: 'proportion' },
        at: reliability,
        points: sampleCurve(0.3, 1, (each) => correctedArea(observed, { reliability: each })),
      },
    }),
})

export const sensorCorrectedByVariances = planQuestion({
  ask: 'variances',
  label: 'By variances',
  title: 'What would the area be without noise, by the variances?',
  lead: `${LEAD} For classes whose spread differs.`,
  entries: {
    observed: OBSERVED,
    variancePresent: positiveEntry({ label: 'Variance seen, present', start: '4500' }),
    varianceAbsent: positiveEntry({ label: 'Variance seen, absent', start: '2500' }),
    errorVariance: notNegativeEntry({
      label: 'Variance of the error',
      start: '900',
      hint: 'Of the mean of the replicates used, day to day included',
    }),
  },
  methods: ['correctedArea'],
  blamed: 'errorVariance',
  refuse: ({ variancePresent, varianceAbsent, errorVariance }) =>
    2 * errorVariance < variancePresent + varianceAbsent
      ? {}
      : {
          errorVariance:
            'More error than was seen in all. It lies below the mean of the two variances seen.',
        },
  work: ({ observed, variancePresent, varianceAbsent, errorVariance }) => {
    const freedOf = (error: number) =>
      correctedArea(observed, {
        observedVariancePresent: variancePresent,
        observedVarianceAbsent: varianceAbsent,
        errorVariance: error,
      })
    const most = 0.45 * (variancePresent + varianceAbsent)
    return freed({
      observed,
      corrected: freedOf(errorVariance),
      because: `an error variance of ${errorVariance}`,
      rows: [0.25, 0.5, 1, 1.5].flatMap((factor) => {
        const error = factor * errorVariance
        if (2 * error >= variancePresent + varianceAbsent) return []
        return [[`Variance ${Number(error.toPrecision(6))}`, formatEstimate(freedOf(error))]]
      }),
      curve: {
        x: { label: 'Variance of the error', kind: 'linear', format: 'concentration' },
        at: errorVariance,
        points: sampleCurve(0, most, freedOf),
      },
    })
  },
})

function freed(parts: {
  observed: number
  corrected: number
  because: string
  rows: string[][]
  curve: {
    x: PlanWork['curve']['x']
    at: number
    points: { x: number; y: number | null }[]
  }
}): PlanWork {
  const { observed, corrected, because, rows, curve } = parts
  return {
    answer: {
      sentence: `An area seen as ${observed} corresponds, with ${because}, to ${formatEstimate(corrected)} without noise.`,
      figures: [
        { label: 'area as seen', value: formatEstimate(observed) },
        { label: 'freed of noise', value: formatEstimate(corrected) },
      ],
      notes: [SECONDARY],
      table: {
        caption: 'Area freed of noise',
        columns: [{ header: 'With' }, { header: 'Area', numeric: true }],
        rows,
      },
    },
    curve: {
      title: `Area freed of noise against the ${curve.x.label.toLowerCase()}`,
      x: curve.x,
      y: { label: 'Area freed of noise', kind: 'linear', format: 'proportion' },
      lines: [{ label: 'Freed of noise', points: curve.points }],
      mark: { x: curve.at, y: corrected, label: formatEstimate(corrected) },
    },
  }
}
