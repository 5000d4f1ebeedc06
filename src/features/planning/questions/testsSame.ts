import { mcnemarTest } from '#shared/statistics/proportions/mcnemarTest.ts'
import { newcombePaired } from '#shared/statistics/proportions/newcombePaired.ts'
import type { PairedCounts } from '#shared/statistics/proportions/PairedCounts.ts'
import {
  formatCount,
  formatEstimate,
  formatFraction,
  formatInterval,
  formatProbability,
} from '#shared/terms/numbers.ts'
import { countEntry, LEVEL } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { levelWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

const count = (label: string, start: string) => countEntry({ label, start, unit: 'subjects' })

export const testsSame = planQuestion({
  ask: 'same',
  label: 'Same subjects',
  title: 'What would a comparison of two tests in the same subjects show?',
  lead: 'Counts expected, or seen in a pilot, in the subjects with the condition (then the difference is one of sensitivities) or in those without (of specificities, with positive and negative changed round).',
  entries: {
    bothPositive: count('Positive by both', '52'),
    firstOnly: count('By the first only', '14'),
    secondOnly: count('By the second only', '5'),
    bothNegative: count('By neither', '9'),
    level: LEVEL,
  },
  methods: ['newcombePaired', 'mcnemar'],
  blamed: 'bothPositive',
  refuse: ({ bothPositive, firstOnly, secondOnly, bothNegative }) =>
    bothPositive + firstOnly + secondOnly + bothNegative > 0
      ? {}
      : { bothPositive: 'No subject is counted. Give the counts that you expect.' },
  work: ({ level, ...counts }) => {
    const { bothPositive, firstOnly, secondOnly, bothNegative } = counts
    const n = bothPositive + firstOnly + secondOnly + bothNegative
    const { difference, method8, method10 } = newcombePaired(counts, { level })
    const test = mcnemarTest(counts)
    const interval = formatInterval(method10.lower, method10.upper)
    const half = (method10.upper - method10.lower) / 2
    return {
      answer: {
        sentence: `In ${formatCount(n)} subjects the first test is positive in ${formatFraction(bothPositive + firstOnly, n)} and the second in ${formatFraction(bothPositive + secondOnly, n)}: a difference of ${formatEstimate(difference)} (${levelWords(level)} interval ${interval}).`,
        figures: [
          { label: 'difference', value: formatEstimate(difference) },
          { label: `${levelWords(level)} interval`, value: interval },
          { label: 'McNemar, mid-p', value: formatProbability(test.midP) },
        ],
        notes: [
          test.notDefined?.sentence ??
            'The test depends on the subjects in whom the two differ, and on nobody else.',
        ],
        table: {
          caption: 'Difference and tests',
          columns: [{ header: 'Method' }, { header: 'Result', numeric: true }],
          rows: [
            ['Newcombe, method 10 (φ corrected)', interval],
            ['Newcombe, method 8', formatInterval(method8.lower, method8.upper)],
            ['McNemar, mid-p', formatProbability(test.midP)],
            ['McNemar, exact p', formatProbability(test.exactP)],
            ['McNemar, χ² without correction', chiSquared(test.chiSquared, test.p)],
            ['McNemar, χ² with continuity correction', chiSquared(test.chiSquaredContinuity, null)],
          ],
        },
      },
      curve: {
        title: 'Half-width of the interval against the number of subjects',
        x: { label: 'Subjects', kind: 'linear', format: 'count' },
        y: { label: 'Half-width of the interval', kind: 'linear', format: 'proportion' },
        lines: [
          {
            label: 'With these shares',
            points: sampleCurve(0.4, 4, (scale) => halfWidthAt(counts, scale, level)).map(
              ({ x: scale, y }) => ({ x: Math.round(scale * n), y }),
            ),
          },
        ],
        mark: { x: n, y: half, label: `±${formatEstimate(half)}` },
      },
    }
  },
})

function chiSquared(value: number | null, p: number | null): string {
  if (value === null) return 'none disagree'
  return p === null ? formatEstimate(value) : `${formatEstimate(value)}, p ${formatProbability(p)}`
}

/** The same shares in a study of another size. */
function halfWidthAt(counts: PairedCounts, scale: number, level: number): number {
  const scaled = Object.fromEntries(
    Object.entries(counts).map(([name, count]) => [name, Math.round(scale * count)]),
  ) as PairedCounts
  const { lower, upper } = newcombePaired(scaled, { level }).method10
  return (upper - lower) / 2
}
