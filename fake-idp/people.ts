/** An invented account of the stand-in identity provider. People are named by what they do. */
export type DemoPerson = {
  /** Stable subject identifier (the `sub` claim), also the user name that one may type. */
  subject: string
  name: string
  email: string
  roles: ('coordinator' | 'monitor' | 'analyst')[]
  /** Heading under which the sign-in page lists the account. */
  group: string
}

const person = (
  group: string,
  role: DemoPerson['roles'][number],
  subject: string,
  name: string,
): DemoPerson => ({ subject, name, email: `${subject}@hospital.example`, roles: [role], group })

const SITES = [
  ['north', 'North ward'],
  ['south', 'South clinic'],
  ['harbour', 'Harbour hospital'],
] as const

const DUTIES = [
  ['bedside', 'bedside'],
  ['reference', 'reference'],
  ['lead', 'site lead'],
] as const

/** One account for each role, duty and site, and one outsider who belongs to no study. */
export const PEOPLE: readonly DemoPerson[] = [
  person('Coordinators of a study', 'coordinator', 'study-lead', 'Coordinator, study lead'),
  ...SITES.flatMap(([site, siteName]) =>
    DUTIES.map(([duty, dutyName]) =>
      person(
        `Coordinators, ${siteName}`,
        'coordinator',
        `${site}-${duty}`,
        `Coordinator, ${dutyName}, ${siteName}`,
      ),
    ),
  ),
  person('Monitors', 'monitor', 'monitor-index', 'Monitor, verify index'),
  person('Monitors', 'monitor', 'monitor-reference', 'Monitor, verify reference'),
  person('Monitors', 'monitor', 'monitor-oversight', 'Monitor, oversight'),
  person('Analysts', 'analyst', 'analyst-centre', 'Analyst, coordinating centre'),
  person('Analysts', 'analyst', 'analyst-second', 'Second analyst'),
  person('Elsewhere', 'coordinator', 'outsider', 'Coordinator, another hospital'),
]

export const personOf = (subject: string): DemoPerson | undefined =>
  PEOPLE.find((each) => each.subject === subject)
