import {
  ALPHA,
  areaEntry,
  countEntry,
  ENROLMENT,
  numberEntry,
  POWER,
  positiveEntry,
  REACH,
} from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { refuseEqualAreas, twoAreas } from './twoAreas.ts'

export const twoAreasPilot = planQuestion({
  ask: 'pilot',
  label: 'From a pilot',
  title: 'How many subjects, going by a pilot on the same subjects?',
  lead: 'Areas, variances and covariance as a paired DeLong comparison of the pilot gives them. A small pilot knows them badly.',
  entries: {
    area1: areaEntry({ label: 'First area', start: '0.7', hint: 'The standard' }),
    area2: areaEntry({ label: 'Second area', start: '0.8' }),
    variance1: positiveEntry({
      label: 'Variance of the first',
      start: '0.0031',
      hint: 'DeLong, at the pilot’s numbers',
    }),
    variance2: positiveEntry({ label: 'Variance of the second', start: '0.0021' }),
    covariance: numberEntry({ label: 'Covariance', start: '0.0009' }),
    nPresent: countEntry({ label: 'Present in the pilot', start: '40', unit: 'subjects' }, 2),
    nAbsent: countEntry({ label: 'Absent in the pilot', start: '70', unit: 'subjects' }, 2),
    power: POWER,
    alpha: ALPHA,
    reach: REACH,
    ...ENROLMENT,
  },
  more: ['reach', 'prevalence', 'withoutResult'],
  methods: ['twoAreas'],
  blamed: 'covariance',
  refuse: (values) => {
    const { variance1, variance2, covariance } = values
    return {
      ...refuseEqualAreas(values),
      ...(covariance >= variance1 || 2 * covariance >= variance1 + variance2
        ? {
            covariance:
              'The covariance lies below the variance of the first area. Check the pilot’s numbers.',
          }
        : {}),
    }
  },
  work: (values) =>
    twoAreas({
      values,
      // The variances are the pilot's own, also where the curve looks at another second area.
      pilot: (area2 = values.area2) => ({ ...values, area2 }),
      where: 'with both measured in each',
      groups: 1,
    }),
})
