import { ABSENT_PER_PRESENT, ALPHA, areaEntry, ENROLMENT, POWER, REACH } from '../planEntries.ts'
import { planQuestion } from '../planQuestion.ts'
import { areaAgainst } from './areaAgainst.ts'

export const areaFloor = planQuestion({
  ask: 'floor',
  label: 'Above a floor',
  title: 'Is the area above a floor?',
  lead: 'A test of one area against the smallest that would still be of use. The floor comes from the clinic, not from the data.',
  entries: {
    expected: areaEntry({
      label: 'Expected area',
      start: '0.8',
      hint: 'From a pilot or from published work; be modest',
    }),
    floor: areaEntry({
      label: 'Floor',
      start: '0.7',
      hint: 'The area to be excluded',
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
  refuse: ({ expected, floor }) =>
    expected > floor ? {} : { floor: 'The floor lies below the expected area. Lower it.' },
  work: (values) => areaAgainst(values, values.floor),
})
