import { type BudererPlan, buderer } from '#shared/statistics/planning/buderer.ts'
import { proportionEstimate } from '#shared/statistics/proportions/proportionEstimate.ts'
import { formatCount, formatInterval, formatPercent } from '#shared/terms/numbers.ts'
import { LEVEL, shareEntry } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { classWords, levelWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

const halfWidth = (label: string) => shareEntry({ label, start: '0.07', hint: 'Either way' })

export const cutOffPrecision = planQuestion({
  ask: 'precision',
  label: 'To a precision',
  title: 'How precisely will sensitivity and specificity be known?',
  lead: 'At a cut-off that the plan fixes beforehand. Subjects come in the order of their arrival, so the prevalence says how soon each class fills.',
  entries: {
    sensitivity: shareEntry({ label: 'Expected sensitivity', start: '0.85' }),
    sensitivityHalfWidth: halfWidth('Half-width, sensitivity'),
    specificity: shareEntry({ label: 'Expected specificity', start: '0.8' }),
    specificityHalfWidth: halfWidth('Half-width, specificity'),
    prevalence: shareEntry({
      label: 'Prevalence',
      start: '0.3',
      hint: 'Share with the condition among those enrolled',
    }),
    level: LEVEL,
  },
  methods: ['buderer', 'wilson'],
  blamed: 'sensitivityHalfWidth',
  work: ({ level, ...plan }) => {
    const sized = (change: Partial<BudererPlan> = {}) => buderer({ ...plan, ...change }, { level })
    const size = sized()
    const {
      totalForSensitivityRounded: forSensitivity,
      totalForSpecificityRounded: forSpecificity,
    } = size
    const total = Math.max(forSensitivity, forSpecificity)
    const longer = forSensitivity >= forSpecificity ? 'sensitivity' : 'specificity'
    const row = (name: string, p: number, width: number, needed: number, enrol: number) => [
      name,
      `${p} ± ${width}`,
      formatCount(needed),
      formatCount(enrol),
      wilsonAt(p, needed, level),
    ]
    return {
      answer: {
        sentence: `To know a sensitivity of ${plan.sensitivity} to within ±${plan.sensitivityHalfWidth} and a specificity of ${plan.specificity} to within ±${plan.specificityHalfWidth} (${levelWords(level)} intervals), the study needs ${classWords(size)}.`,
        figures: [
          { label: 'present', value: formatCount(size.present), outcome: 'present' },
          { label: 'absent', value: formatCount(size.absent), outcome: 'absent' },
          { label: 'to enrol', value: formatCount(total) },
        ],
        notes: [
          `Enrol ${formatCount(total)} subjects in order, so that both classes fill at a prevalence of ${formatPercent(plan.prevalence)}; the ${longer} takes the longer. That is an expectation: plan a margin.`,
        ],
        table: {
          caption: 'Subjects by measure',
          columns: [
            { header: 'Measure' },
            { header: 'Wanted', numeric: true },
            { header: 'Of its class', numeric: true },
            { header: 'To enrol', numeric: true },
            { header: 'Wilson interval then', numeric: true },
          ],
          rows: [
            row(
              'Sensitivity',
              plan.sensitivity,
              plan.sensitivityHalfWidth,
              size.present,
              forSensitivity,
            ),
            row(
              'Specificity',
              plan.specificity,
              plan.specificityHalfWidth,
              size.absent,
              forSpecificity,
            ),
          ],
        },
      },
      curve: {
        title: 'Subjects to enrol against the prevalence',
        x: { label: 'Prevalence', kind: 'linear', format: 'proportion' },
        y: { label: 'Subjects to enrol', kind: 'log', format: 'count' },
        lines: [
          {
            label: 'For the sensitivity',
            points: sampleCurve(
              0.04,
              0.96,
              (prevalence) => sized({ prevalence }).totalForSensitivityRounded,
            ),
          },
          {
            label: 'For the specificity',
            points: sampleCurve(
              0.04,
              0.96,
              (prevalence) => sized({ prevalence }).totalForSpecificityRounded,
            ),
          },
        ],
        mark: { x: plan.prevalence, y: total, label: formatCount(total) },
      },
    }
  },
})

/** The interval that the study would show if the expectation came true. */
function wilsonAt(p: number, n: number, level: number): string {
  const { lower, upper } = proportionEstimate(Math.round(p * n), n, { level })
  return formatInterval(lower, upper)
}
