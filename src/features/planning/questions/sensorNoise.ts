import { expectedArea, type NoisySensor } from '#shared/statistics/sensor/expectedArea.ts'
import { formatEstimate } from '#shared/terms/numbers.ts'
import {
  countEntry,
  notNegativeEntry,
  numberEntry,
  positiveEntry,
  shareEntry,
} from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { sampleCurve } from '../sampleCurve.ts'

export const sensorNoise = planQuestion({
  ask: 'noise',
  label: 'Noise and replicates',
  title: 'How far do noise and replicates move the area?',
  lead: 'Larger values point to the condition; values in each class are about normal, perhaps after a logarithm. All in one unit.',
  entries: {
    meanPresent: numberEntry({ label: 'Mean, present', start: '250' }),
    meanAbsent: numberEntry({ label: 'Mean, absent', start: '150' }),
    sdPresent: positiveEntry({
      label: 'SD, present',
      start: '60',
      hint: 'Between subjects, without noise',
    }),
    sdAbsent: positiveEntry({
      label: 'SD, absent',
      start: '40',
      hint: 'Between subjects, without noise',
    }),
    sdReading: notNegativeEntry({
      label: 'SD of a reading',
      start: '30',
      hint: 'Within one session',
    }),
    sdDay: notNegativeEntry({
      label: 'SD from day to day',
      start: '0',
      hint: 'Replicates of one session do not average it away',
    }),
    replicates: countEntry({ label: 'Replicates averaged', start: '3', unit: 'exhalations' }, 1),
    specificity: shareEntry({
      label: 'Specificity',
      start: '0.9',
      hint: 'At which the sensitivity is wanted',
    }),
  },
  methods: ['measurementError'],
  blamed: 'sdReading',
  work: ({ specificity, ...sensor }) => {
    const { sdReading, replicates, meanPresent, meanAbsent } = sensor
    const seen = (change: Partial<NoisySensor> = {}) =>
      expectedArea({ ...sensor, ...change }, { specificity })
    const now = seen()
    const counts = [...new Set([1, 2, 3, 5, 10, replicates])].sort((a, b) => a - b)
    return {
      answer: {
        sentence: `An area of ${formatEstimate(now.trueArea)} without noise is expected to be seen as ${formatEstimate(now.observedArea)} when ${replicates === 1 ? 'a single exhalation counts' : `${replicates} exhalations are averaged`}.`,
        figures: [
          { label: 'area without noise', value: formatEstimate(now.trueArea) },
          { label: 'area as seen', value: formatEstimate(now.observedArea) },
          {
            label: `sensitivity at specificity ${specificity}`,
            value: formatEstimate(now.observedSensitivity),
          },
        ],
        notes: [
          `Without noise the sensitivity would be ${formatEstimate(now.trueSensitivity)}. Plan with the area as seen.`,
          ...(meanPresent < meanAbsent
            ? [
                'The mean with the condition is the lower one, so this area lies below 0.5. Where lower values point to the condition, change the two means round.',
              ]
            : []),
        ],
        table: {
          caption: 'By replicates averaged',
          columns: [
            { header: 'Replicates', numeric: true },
            { header: 'Area as seen', numeric: true },
            { header: 'Sensitivity', numeric: true },
            { header: 'Reliability, present', numeric: true },
            { header: 'Reliability, absent', numeric: true },
          ],
          rows: counts.map((m) => {
            const { observedArea, observedSensitivity } = seen({ replicates: m })
            return [
              String(m),
              formatEstimate(observedArea),
              formatEstimate(observedSensitivity),
              formatEstimate(reliability(sensor.sdPresent, sensor, m)),
              formatEstimate(reliability(sensor.sdAbsent, sensor, m)),
            ]
          }),
        },
      },
      curve: {
        title: 'Area as seen against the SD of a reading',
        x: { label: 'SD of a reading', kind: 'linear', format: 'concentration' },
        y: { label: 'Area as seen', kind: 'linear', format: 'proportion' },
        lines: [...new Set([replicates, 1, 3, 10])].map((m) => ({
          label: m === 1 ? '1 exhalation' : `${m} exhalations`,
          points: sampleCurve(
            0,
            2 * (sdReading || sensor.sdAbsent),
            (sd) => seen({ sdReading: sd, replicates: m }).observedArea,
          ),
        })),
        mark: { x: sdReading, y: now.observedArea, label: formatEstimate(now.observedArea) },
      },
    }
  },
})

/** Within-class reliability of a mean of m readings: σ²/(σ² + σ_day² + σ_reading²/m). */
function reliability(
  sd: number,
  { sdReading, sdDay }: { sdReading: number; sdDay: number },
  m: number,
): number {
  return sd ** 2 / (sd ** 2 + sdDay ** 2 + sdReading ** 2 / m)
}
