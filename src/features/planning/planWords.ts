import { formatCount } from '#shared/terms/numbers.ts'

/** "127 subjects with the condition and 127 without". */
export const classWords = ({ present, absent }: { present: number; absent: number }): string =>
  `${formatCount(present)} ${present === 1 ? 'subject' : 'subjects'} with the condition and ${formatCount(absent)} without`

/** The headline of a plan for two classes. */
export const classFigures = ({ present, absent }: { present: number; absent: number }) => [
  { label: 'present', value: formatCount(present), outcome: 'present' as const },
  { label: 'absent', value: formatCount(absent), outcome: 'absent' as const },
  { label: 'in all', value: formatCount(present + absent) },
]

/** "95 %". */
export const levelWords = (level: number): string => `${Number((level * 100).toFixed(2))} %`
