import {
  newcombeIndependent,
  type Proportion,
} from '#shared/statistics/proportions/newcombeIndependent.ts'
import {
  formatCount,
  formatEstimate,
  formatFraction,
  formatInterval,
} from '#shared/terms/numbers.ts'
import { countEntry, LEVEL } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { levelWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

const TOO_MANY = 'More positives than subjects. Lower it, or count more subjects.'

export const testsDifferent = planQuestion({
  ask: 'different',
  label: 'Different subjects',
  title: 'What would a comparison of two tests in different subjects show?',
  lead: 'Counts expected, or seen in a pilot, in one class of each group: positives with the condition for sensitivities, negatives without it for specificities.',
  entries: {
    positives1: countEntry({ label: 'First: positives', start: '56' }),
    subjects1: countEntry({ label: 'First: subjects', start: '70' }, 1),
    positives2: countEntry({ label: 'Second: positives', start: '48' }),
    subjects2: countEntry({ label: 'Second: subjects', start: '80' }, 1),
    level: LEVEL,
  },
  methods: ['newcombeIndependent'],
  blamed: 'positives1',
  refuse: ({ positives1, subjects1, positives2, subjects2 }) => ({
    ...(positives1 > subjects1 ? { positives1: TOO_MANY } : {}),
    ...(positives2 > subjects2 ? { positives2: TOO_MANY } : {}),
  }),
  work: ({ positives1, subjects1, positives2, subjects2, level }) => {
    const first = { numerator: positives1, denominator: subjects1 }
    const second = { numerator: positives2, denominator: subjects2 }
    const { difference, method10, method11, wald } = newcombeIndependent(first, second, { level })
    const interval = formatInterval(method10.lower, method10.upper)
    const half = (method10.upper - method10.lower) / 2
    const n = subjects1 + subjects2
    return {
      answer: {
        sentence: `The first test is positive in ${formatFraction(positives1, subjects1)} and the second in ${formatFraction(positives2, subjects2)}: a difference of ${formatEstimate(difference)} (${levelWords(level)} interval ${interval}).`,
        figures: [
          { label: 'difference', value: formatEstimate(difference) },
          { label: `${levelWords(level)} interval`, value: interval },
          { label: 'subjects', value: formatCount(n) },
        ],
        notes: [],
        table: {
          caption: 'Interval of the difference',
          columns: [{ header: 'Method' }, { header: 'Interval', numeric: true }],
          rows: [
            ['Newcombe, method 10 (Wilson limits)', interval],
            [
              'Newcombe, method 11 (with continuity correction)',
              formatInterval(method11.lower, method11.upper),
            ],
            ['Wald, for comparison only', formatInterval(wald.lower, wald.upper)],
          ],
        },
      },
      curve: {
        title: 'Half-width of the interval against the number of subjects',
        x: { label: 'Subjects in both groups', kind: 'linear', format: 'count' },
        y: { label: 'Half-width of the interval', kind: 'linear', format: 'proportion' },
        lines: [
          {
            label: 'With these shares',
            points: sampleCurve(0.4, 4, (scale) => halfWidthAt(first, second, scale, level)).map(
              ({ x: scale, y }) => ({ x: Math.round(scale * n), y }),
            ),
          },
        ],
        mark: { x: n, y: half, label: `±${formatEstimate(half)}` },
      },
    }
  },
})

/** The same shares in groups of another size. */
function halfWidthAt(first: Proportion, second: Proportion, scale: number, level: number): number {
  const scaled = ({ numerator, denominator }: Proportion) => ({
    numerator: Math.round(scale * numerator),
    denominator: Math.max(1, Math.round(scale * denominator)),
  })
  const { lower, upper } = newcombeIndependent(scaled(first), scaled(second), { level }).method10
  return (upper - lower) / 2
}
