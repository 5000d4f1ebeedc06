import { areaSampleSizeAgainstHalf } from '#shared/statistics/planning/areaSampleSizeAgainstHalf.ts'
import { ABSENT_PER_PRESENT, ALPHA, areaEntry, ENROLMENT, POWER, REACH } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { areaAgainst } from './areaAgainst.ts'

export const areaHalf = planQuestion({
  ask: 'half',
  label: 'Above chance',
  title: 'Does the biomarker tell the condition at all?',
  lead: 'A test of one area against 0.5. A first look at a new gas: an area above chance is no proof of use. To claim one, plan against a floor.',
  entries: {
    expected: areaEntry({
      label: 'Expected area',
      start: '0.7',
      hint: 'From a pilot or from published work; be modest',
    }),
    power: POWER,
    alpha: ALPHA,
    absentPerPresent: ABSENT_PER_PRESENT,
    reach: REACH,
    ...ENROLMENT,
  },
  more: ['reach', 'prevalence', 'withoutResult'],
  methods: ['hanleyMcNeil', 'binormal'],
  blamed: 'expected',
  refuse: ({ expected }) =>
    expected > 0.5 ? {} : { expected: 'An area of 0.5 is chance itself. Give one above 0.5.' },
  work: (values) => {
    const { expected: area, power, alpha, absentPerPresent } = values
    const againstHalf = areaSampleSizeAgainstHalf({ area, power, alpha, absentPerPresent })
    return areaAgainst(values, 0.5, [
      { name: 'Binormal variance, null fixed at 0.0792', ...againstHalf },
    ])
  },
})
