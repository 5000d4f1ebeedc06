/** Roles come from the identity provider; duties and sites from the study's team list. */
export const ROLES = ['coordinator', 'monitor', 'analyst'] as const
export type Role = (typeof ROLES)[number]

/** Which role may carry which duty. An analyst has no duties beyond the role. */
export const DUTIES_OF_ROLE = {
  coordinator: ['bedside', 'reference', 'siteLead', 'studyLead'],
  monitor: ['verifyIndex', 'verifyReference', 'oversight'],
  analyst: [],
} as const satisfies Record<Role, readonly string[]>

export type Duty = (typeof DUTIES_OF_ROLE)[Role][number]
export const DUTIES = Object.values(DUTIES_OF_ROLE).flat() as Duty[]

/** Duties that are carried at one site; the others concern the whole study. */
export const SITE_DUTIES: readonly Duty[] = ['bedside', 'reference', 'siteLead']

export const STUDY_KINDS = ['prospective', 'earlierData'] as const
export type StudyKind = (typeof STUDY_KINDS)[number]

/** One active line of the team list, for one person in one study. */
export type Membership = { role: Role; duty: Duty | null; siteId: string | null }
