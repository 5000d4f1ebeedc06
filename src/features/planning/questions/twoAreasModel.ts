import { obuchowskiVariance } from '#shared/statistics/planning/obuchowskiVariance.ts'
import type { PilotComparison } from '#shared/statistics/planning/PilotComparison.ts'
import { ABSENT_PER_PRESENT, ALPHA, areaEntry, ENROLMENT, POWER, REACH } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { refuseEqualAreas, twoAreas } from './twoAreas.ts'

const AREAS = {
  area1: areaEntry({
    label: 'First area',
    start: '0.75',
    hint: 'The standard; its variance is used under no difference',
  }),
  area2: areaEntry({ label: 'Second area', start: '0.85', hint: 'The one that should be better' }),
}
const TEST = { power: POWER, alpha: ALPHA, absentPerPresent: ABSENT_PER_PRESENT, reach: REACH }

/** Binormal variances for one subject with the condition, which scale to any number. */
function modelled(
  areas: { area1: number; area2: number },
  absentPerPresent: number,
  correlation: number,
): PilotComparison {
  const variance1 = obuchowskiVariance(areas.area1, absentPerPresent)
  const variance2 = obuchowskiVariance(areas.area2, absentPerPresent)
  return {
    ...areas,
    variance1,
    variance2,
    covariance: correlation * Math.sqrt(variance1 * variance2),
    nPresent: 1,
    nAbsent: absentPerPresent,
  }
}

export const twoAreasSame = planQuestion({
  ask: 'same',
  label: 'Same subjects',
  title: 'Is one biomarker better than another on the same subjects?',
  lead: 'Both are measured in every subject, so the two areas go up and down together. How much they do is their correlation.',
  entries: {
    ...AREAS,
    correlation: {
      label: 'Correlation of the areas',
      start: '0.5',
      hint: 'From a pilot; 0 takes no credit for the pairing and is the safe choice',
      optional: false,
      refuse: (value: number) =>
        value >= 0 && value < 1 ? null : 'From 0 to below 1, such as 0.5.',
    },
    ...TEST,
    ...ENROLMENT,
  },
  more: ['reach', 'prevalence', 'withoutResult'],
  methods: ['twoAreas', 'binormal'],
  blamed: 'area2',
  refuse: refuseEqualAreas,
  work: (values) =>
    twoAreas({
      values,
      pilot: (area2 = values.area2) =>
        modelled({ area1: values.area1, area2 }, values.absentPerPresent, values.correlation),
      where: 'with both measured in each',
      groups: 1,
    }),
})

export const twoAreasDifferent = planQuestion({
  ask: 'different',
  label: 'Different subjects',
  title: 'Is one biomarker better than another in different subjects?',
  lead: 'Each is measured in a group of its own. Measuring both in the same subjects nearly always needs fewer.',
  entries: { ...AREAS, ...TEST, ...ENROLMENT },
  more: ['reach', 'prevalence', 'withoutResult'],
  methods: ['twoAreas', 'binormal'],
  blamed: 'area2',
  refuse: refuseEqualAreas,
  work: (values) =>
    twoAreas({
      values,
      pilot: (area2 = values.area2) =>
        modelled({ area1: values.area1, area2 }, values.absentPerPresent, 0),
      where: 'in each of the two groups',
      groups: 2,
    }),
})
