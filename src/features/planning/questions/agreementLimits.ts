import { limitsPrecision } from '#shared/statistics/planning/limitsPrecision.ts'
import { limitsSampleSize } from '#shared/statistics/planning/limitsSampleSize.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { LEVEL, positiveEntry, WITHOUT_RESULT } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { levelWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

const IN_UNIT = 'In the unit of the readings, such as ppb'

export const agreementLimits = planQuestion({
  ask: 'limits',
  label: 'Limits of agreement',
  title: 'How many pairs place the limits of agreement well enough?',
  lead: 'Sensor and reference analyser on the same breath, one pair for each subject. The limits are placed less precisely than the bias, so they decide.',
  entries: {
    sd: positiveEntry({ label: 'SD of the differences', start: '45', hint: IN_UNIT }),
    halfWidth: positiveEntry({
      label: 'Half-width wanted',
      start: '15',
      hint: 'Of the interval of either limit, in the same unit',
    }),
    level: LEVEL,
    reach: {
      label: 'Pairs you can reach',
      start: '',
      hint: 'The half-width of a smaller study',
      optional: true,
      refuse: (value: number) =>
        Number.isSafeInteger(value) && value >= 3 ? null : 'A whole number from 3 on.',
    },
    withoutResult: WITHOUT_RESULT,
  },
  more: ['reach', 'withoutResult'],
  methods: ['limits1986', 'limits1999'],
  blamed: 'halfWidth',
  work: ({ sd, halfWidth, level, reach, withoutResult = 0 }) => {
    const pairsFor = (each: number) => limitsSampleSize(halfWidth / each, { level })
    const n = pairsFor(sd)
    const enrol = Math.ceil(n / (1 - withoutResult / 100) - 1e-9)
    const widthWords = (pairs: number) => {
      const { halfWidthSd, halfWidthSd1999 } = limitsPrecision(pairs, { level })
      return [formatConcentration(halfWidthSd * sd), formatConcentration(halfWidthSd1999 * sd)]
    }
    const sizes = [...new Set([20, 50, 100, 200, n])].sort((a, b) => a - b)
    return {
      answer: {
        sentence: `To place each limit of agreement to within ±${halfWidth} (${levelWords(level)} interval) when the differences have an SD of ${sd}, the study needs ${formatCount(n)} pairs, one for each subject.`,
        figures: [
          { label: 'pairs', value: formatCount(n) },
          { label: 'of an SD, the half-width', value: formatConcentration(halfWidth / sd, 3) },
        ],
        notes: [
          'That is by the formula of 1986. The one of 1999 is a little narrower: the table has both.',
          ...(reach === undefined
            ? []
            : [`With ${formatCount(reach)} pairs the half-width is ±${widthWords(reach)[0]}.`]),
          ...(withoutResult > 0
            ? [
                `Enrol ${formatCount(enrol)} subjects, with ${withoutResult} % without a valid result.`,
              ]
            : []),
        ],
        table: {
          caption: 'Half-width of a limit by number of pairs',
          columns: [
            { header: 'Pairs', numeric: true },
            { header: 'Half-width, 1986', numeric: true },
            { header: 'Half-width, 1999', numeric: true },
          ],
          rows: sizes.map((size) => [formatCount(size), ...widthWords(size)]),
        },
      },
      curve: {
        title: 'Pairs against the SD of the differences',
        x: { label: 'SD of the differences', kind: 'linear', format: 'concentration' },
        y: { label: 'Pairs', kind: 'log', format: 'count' },
        lines: [1, 0.67, 1.5].map((factor) => ({
          label: `Half-width ${formatConcentration(factor * halfWidth, 3)}`,
          points: sampleCurve(0.4 * sd, 2 * sd, (each) => pairsFor(each / factor)),
        })),
        mark: { x: sd, y: n, label: formatCount(n) },
      },
    }
  },
})
