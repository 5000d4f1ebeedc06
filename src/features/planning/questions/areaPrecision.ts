import { areaPrecision as precisionOf } from '#shared/statistics/planning/areaPrecision.ts'
import { formatCount, formatEstimate } from '#shared/terms/numbers.ts'
import { enrolmentNote } from '../enrolment.ts'
import { ABSENT_PER_PRESENT, areaEntry, ENROLMENT, LEVEL, shareEntry } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { classFigures, classWords, levelWords } from '../planWords.ts'
import { sampleCurve } from '../sampleCurve.ts'

export const areaPrecision = planQuestion({
  ask: 'precision',
  label: 'To a precision',
  title: 'How precisely will the area be known?',
  lead: 'For a study that estimates and tests nothing: subjects so that the interval of the area is no wider than wanted.',
  entries: {
    area: areaEntry({
      label: 'Expected area',
      start: '0.85',
      hint: 'A lower one needs more subjects',
    }),
    halfWidth: shareEntry({
      label: 'Half-width wanted',
      start: '0.05',
      hint: 'The interval reaches this far either way',
    }),
    level: LEVEL,
    absentPerPresent: ABSENT_PER_PRESENT,
    ...ENROLMENT,
  },
  more: ['prevalence', 'withoutResult'],
  methods: ['hanleyMcNeil'],
  blamed: 'halfWidth',
  work: (values) => {
    const { area, halfWidth, level, absentPerPresent } = values
    const sized = (width: number, expected = area) =>
      precisionOf({ area: expected, halfWidth: width, absentPerPresent }, { level })
    const size = sized(halfWidth)
    const widths = [...new Set([halfWidth / 2, halfWidth, 1.5 * halfWidth, 2 * halfWidth])]
    return {
      answer: {
        sentence: `To know an area of ${area} to within ±${halfWidth} (${levelWords(level)} interval), the study needs ${classWords(size)}.`,
        figures: classFigures(size),
        notes: [
          `At these numbers the half-width is ${formatEstimate(size.halfWidth)}. Half the width takes about four times the subjects.`,
          ...enrolmentNote(size, values),
        ],
        table: {
          caption: 'Subjects by half-width',
          columns: [
            { header: 'Half-width wanted' },
            { header: 'Present', numeric: true },
            { header: 'Absent', numeric: true },
            { header: 'Reached', numeric: true },
          ],
          rows: widths.map((width) => {
            const { present, absent, halfWidth: reached } = sized(width)
            return [
              `±${Number(width.toPrecision(6))}`,
              formatCount(present),
              formatCount(absent),
              formatEstimate(reached),
            ]
          }),
        },
      },
      curve: {
        title: 'Subjects with the condition against the expected area',
        x: { label: 'Expected area', kind: 'linear', format: 'proportion' },
        y: { label: 'Subjects with the condition', kind: 'log', format: 'count' },
        lines: [halfWidth, 1.5 * halfWidth, 2 * halfWidth].map((width) => ({
          label: `Half-width ${Number(width.toPrecision(6))}`,
          points: sampleCurve(0.5, 0.98, (expected) => sized(width, expected).present),
        })),
        mark: { x: area, y: size.present, label: formatCount(size.present) },
      },
    }
  },
})
