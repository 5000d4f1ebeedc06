import { replicatesForReliability } from '#shared/statistics/sensor/replicatesForReliability.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'
import { shareEntry } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { sampleCurve } from '../sampleCurve.ts'

export const sensorReplicates = planQuestion({
  ask: 'replicates',
  label: 'Replicates for a reliability',
  title: 'How many exhalations make the mean reliable?',
  lead: 'Reliability is that within a class: the pooled one of a mixed group is too high. Replicates of one session leave the day-to-day part where it is.',
  entries: {
    single: shareEntry({
      label: 'Reliability of one reading',
      start: '0.7',
      hint: 'Intraclass correlation within a class',
    }),
    wanted: shareEntry({ label: 'Reliability wanted', start: '0.9' }),
  },
  methods: ['spearmanBrown'],
  blamed: 'single',
  work: ({ single, wanted }) => {
    const { exact, replicates } = replicatesForReliability(single, wanted)
    const levels = [...new Set([0.7, 0.8, 0.85, 0.9, 0.95, wanted])].sort((a, b) => a - b)
    return {
      answer: {
        sentence: `To raise a reliability of ${single} to ${wanted}, average ${formatCount(replicates)} ${replicates === 1 ? 'exhalation' : 'exhalations'}.`,
        figures: [
          {
            label: replicates === 1 ? 'exhalation' : 'exhalations',
            value: formatCount(replicates),
          },
          { label: 'before rounding up', value: formatConcentration(exact) },
        ],
        notes: [],
        table: {
          caption: 'Exhalations by reliability wanted',
          columns: [
            { header: 'Reliability wanted', numeric: true },
            { header: 'Exhalations', numeric: true },
            { header: 'Before rounding up', numeric: true },
          ],
          rows: levels.map((level) => {
            const found = replicatesForReliability(single, level)
            return [String(level), formatCount(found.replicates), formatConcentration(found.exact)]
          }),
        },
      },
      curve: {
        title: 'Exhalations against the reliability of one reading',
        x: { label: 'Reliability of one reading', kind: 'linear', format: 'proportion' },
        y: { label: 'Exhalations', kind: 'log', format: 'count' },
        lines: [...new Set([wanted, 0.8, 0.9, 0.95])].map((level) => ({
          label: `For ${level}`,
          points: sampleCurve(
            0.2,
            0.96,
            (each) => replicatesForReliability(each, level).replicates,
            152,
          ),
        })),
        mark: { x: single, y: replicates, label: formatCount(replicates) },
      },
    }
  },
})
