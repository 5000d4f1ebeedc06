import type { Duty, Role } from './people.ts'

/** What a datum could tell: sensor values, reference values, or anything that joins both. */
export const INFORMATION_CLASSES = ['none', 'index', 'reference', 'linked'] as const
export type InformationClass = (typeof INFORMATION_CLASSES)[number]

type Seen = 'always' | 'afterRelease' | 'never'
type Row = { index: Seen; reference: Seen; linked: Seen }

/**
 * The blinding table of a prospective study: who may ever read single values of a class.
 * "Linked" of the oversight monitor means reports, of the analyst means locked datasets;
 * counts and states are class `none`. An earlier-data study holds both classes together and is
 * treated as released from its first row.
 */
export const BLINDING: Record<Duty | 'analyst', Row> = {
  bedside: { index: 'always', reference: 'afterRelease', linked: 'afterRelease' },
  reference: { index: 'afterRelease', reference: 'always', linked: 'afterRelease' },
  siteLead: { index: 'afterRelease', reference: 'afterRelease', linked: 'afterRelease' },
  studyLead: { index: 'afterRelease', reference: 'afterRelease', linked: 'afterRelease' },
  verifyIndex: { index: 'always', reference: 'never', linked: 'never' },
  verifyReference: { index: 'never', reference: 'always', linked: 'never' },
  oversight: { index: 'never', reference: 'never', linked: 'always' },
  analyst: { index: 'never', reference: 'never', linked: 'always' },
}

/** Whether a duty (or the analyst's role) may read single values of a class. */
export function maySee(
  role: Role,
  duty: Duty | null,
  informationClass: InformationClass,
  released: boolean,
): boolean {
  if (informationClass === 'none') return true
  const row = role === 'analyst' ? BLINDING.analyst : duty ? BLINDING[duty] : undefined
  const seen = row?.[informationClass] ?? 'never'
  return seen === 'always' || (seen === 'afterRelease' && released)
}
