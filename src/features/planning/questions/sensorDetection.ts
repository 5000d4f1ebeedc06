import { areaBelowDetection } from '#shared/statistics/sensor/areaBelowDetection.ts'
import { formatEstimate, formatPercent } from '#shared/terms/numbers.ts'
import { numberEntry, positiveEntry } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { sampleCurve } from '../sampleCurve.ts'

export const sensorDetection = planQuestion({
  ask: 'detection',
  label: 'Below detection',
  title: 'What do values below the limit of detection cost?',
  lead: 'Larger values point to the condition; values in each class are about normal, perhaps after a logarithm. Below the limit they cannot be told apart.',
  entries: {
    meanPresent: numberEntry({ label: 'Mean, present', start: '250' }),
    meanAbsent: numberEntry({ label: 'Mean, absent', start: '150' }),
    sdPresent: positiveEntry({ label: 'SD, present', start: '60' }),
    sdAbsent: positiveEntry({ label: 'SD, absent', start: '40' }),
    limit: numberEntry({ label: 'Limit of detection', start: '150', hint: 'In the same unit' }),
  },
  methods: ['belowDetection'],
  blamed: 'limit',
  refuse: ({ meanAbsent, sdAbsent, limit }) =>
    limit <= meanAbsent + 6 * sdAbsent
      ? {}
      : { limit: 'Nobody without the condition would be above this limit. Lower it.' },
  work: ({ limit, ...classes }) => {
    const at = (each: number) => areaBelowDetection({ ...classes, limit: each })
    const { meanAbsent, sdAbsent } = classes
    const lowest = meanAbsent - 3 * sdAbsent
    const now = at(limit)
    const none = at(meanAbsent - 9 * sdAbsent).tied
    const limits = [-1, -0.5, 0, 0.5, 1].map((z) => meanAbsent + z * sdAbsent)
    const shown = [...new Set([...limits, limit])].sort((a, b) => a - b)
    return {
      answer: {
        sentence: `With a limit of detection of ${limit} the area is expected to be ${formatEstimate(now.tied)}, instead of ${formatEstimate(none)} if every value could be read.`,
        figures: [
          { label: 'area, kept as ties', value: formatEstimate(now.tied) },
          { label: 'present below the limit', value: formatPercent(now.shareCensoredPresent) },
          { label: 'absent below the limit', value: formatPercent(now.shareCensoredAbsent) },
        ],
        notes: [
          `Keep rows below the limit as ties, and state the limit and their share. Dropping them would give ${formatEstimate(now.dropped)}, which is biased.`,
        ],
        table: {
          caption: 'By limit of detection',
          columns: [
            { header: 'Limit', numeric: true },
            { header: 'Kept as ties', numeric: true },
            { header: 'Dropped', numeric: true },
            { header: 'Present below', numeric: true },
            { header: 'Absent below', numeric: true },
          ],
          rows: shown.map((each) => {
            const found = at(each)
            return [
              String(Number(each.toPrecision(6))),
              formatEstimate(found.tied),
              formatEstimate(found.dropped),
              formatPercent(found.shareCensoredPresent),
              formatPercent(found.shareCensoredAbsent),
            ]
          }),
        },
      },
      curve: {
        title: 'Area against the limit of detection',
        x: { label: 'Limit of detection', kind: 'linear', format: 'concentration' },
        y: { label: 'Area', kind: 'linear', format: 'proportion' },
        lines: [
          {
            label: 'Kept as ties',
            points: sampleCurve(
              Math.min(lowest, limit),
              Math.max(meanAbsent + 2 * sdAbsent, limit),
              (each) => at(each).tied,
            ),
          },
          {
            label: 'Dropped: biased',
            points: sampleCurve(
              Math.min(lowest, limit),
              Math.max(meanAbsent + 2 * sdAbsent, limit),
              (each) => at(each).dropped,
            ),
          },
        ],
        mark: { x: limit, y: now.tied, label: formatEstimate(now.tied) },
      },
    }
  },
})
