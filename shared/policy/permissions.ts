import type { InformationClass } from './informationClasses.ts'
import type { Duty, Role, StudyKind } from './people.ts'

/**
 * `ownSite`: records of the site in the member's line; `study`: the whole study;
 * `self`: records that the person started; `installation`: no study is involved.
 */
export type Scope = 'ownSite' | 'study' | 'self' | 'installation'
export type Grant = { role: Role; duty: Duty | null; scope: Scope; afterRelease?: true }

export type PolicyRow = {
  /** `list` filters its rows by the sites that the grant covers; `write` goes through change(). */
  effect: 'read' | 'list' | 'write'
  grants: readonly Grant[]
  reveals: InformationClass
  /** Writes, and reads that go on record: what a locked study does with it. */
  whenLocked?: 'refuse' | 'allow'
  /** Writes, and reads that go on record: the audit event, past tense. */
  records?: string
  /** Writes that end all other writing take the study's guard for themselves. */
  guard?: 'exclusive'
  onlyKind?: StudyKind
}

type Where = 'ownSite' | 'study'
const coordinator = (duty: Duty) => (scope: Where) =>
  ({ role: 'coordinator', duty, scope }) as const
const monitor = (duty: Duty) => (scope: Where) => ({ role: 'monitor', duty, scope }) as const

const bedside = coordinator('bedside')
const reference = coordinator('reference')
const siteLead = coordinator('siteLead')
const studyLead = coordinator('studyLead')
const verifyIndex = monitor('verifyIndex')
const verifyReference = monitor('verifyReference')
const oversight = monitor('oversight')
const analyst = (scope: Where) => ({ role: 'analyst', duty: null, scope }) as const
const released = (grant: Grant): Grant => ({ ...grant, afterRelease: true })

const anyone: readonly Grant[] = (['coordinator', 'monitor', 'analyst'] as const).map((role) => ({
  role,
  duty: null,
  scope: 'installation',
}))
const starter: readonly Grant[] = anyone.map((grant) => ({ ...grant, scope: 'self' }))
const site = [bedside('ownSite'), reference('ownSite'), siteLead('ownSite')] as const
const monitors = [verifyIndex('study'), verifyReference('study'), oversight('study')] as const
const team: readonly Grant[] = [...site, studyLead('study'), ...monitors, analyst('study')]
const teamButAnalyst: readonly Grant[] = [...site, studyLead('study'), ...monitors]

/** action → who may, what a lock does to it, which information class it reveals. The one table. */
export const POLICY = {
  'me.read': { effect: 'read', grants: anyone, reveals: 'none' },
  'login.end': {
    effect: 'write',
    grants: anyone,
    reveals: 'none',
    whenLocked: 'allow',
    records: 'login.ended',
  },

  'study.list': { effect: 'list', grants: anyone, reveals: 'none' },
  'study.create': {
    effect: 'write',
    grants: [{ role: 'coordinator', duty: null, scope: 'installation' }],
    reveals: 'none',
    whenLocked: 'allow',
    records: 'study.created',
  },
  'study.read': { effect: 'read', grants: team, reveals: 'none' },
  'protocol.read': { effect: 'read', grants: team, reveals: 'none' },
  'protocol.amend': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'protocol.amended',
  },

  'site.list': { effect: 'read', grants: team, reveals: 'none' },
  'site.add': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'site.added',
  },
  'site.correct': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'site.corrected',
  },

  'person.list': { effect: 'read', grants: [studyLead('study')], reveals: 'none' },
  'member.list': { effect: 'read', grants: team, reveals: 'none' },
  'member.add': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'allow',
    records: 'member.added',
  },
  'member.end': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'allow',
    records: 'member.ended',
  },

  'analyte.list': { effect: 'read', grants: team, reveals: 'none' },
  'analyte.add': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'analyte.added',
  },

  'subject.list': { effect: 'list', grants: teamButAnalyst, reveals: 'none' },
  'subject.read': { effect: 'read', grants: teamButAnalyst, reveals: 'none' },
  'subject.enrol': {
    effect: 'write',
    grants: [bedside('ownSite')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'subject.enrolled',
  },
  'subject.correct': {
    effect: 'write',
    grants: [bedside('ownSite'), siteLead('ownSite')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'subject.corrected',
  },

  'session.list': {
    effect: 'list',
    grants: [
      bedside('ownSite'),
      released(siteLead('ownSite')),
      released(studyLead('study')),
      verifyIndex('study'),
    ],
    reveals: 'index',
  },
  'reference.list': {
    effect: 'list',
    grants: [
      reference('ownSite'),
      released(siteLead('ownSite')),
      released(studyLead('study')),
      verifyReference('study'),
    ],
    reveals: 'reference',
  },

  'import.list': {
    effect: 'read',
    grants: [studyLead('study'), oversight('study')],
    reveals: 'none',
    onlyKind: 'earlierData',
  },
  'import.read': {
    effect: 'read',
    grants: [released(studyLead('study'))],
    reveals: 'linked',
    onlyKind: 'earlierData',
  },
  'import.upload': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'import.uploaded',
    onlyKind: 'earlierData',
  },
  'import.preview': {
    effect: 'write',
    grants: [released(studyLead('study'))],
    reveals: 'linked',
    whenLocked: 'refuse',
    records: 'import.columnsNamed',
    onlyKind: 'earlierData',
  },
  // What the job does on behalf of the person who asked.
  'import.judge': {
    effect: 'write',
    grants: [released(studyLead('study'))],
    reveals: 'linked',
    whenLocked: 'refuse',
    records: 'import.previewed',
    onlyKind: 'earlierData',
  },
  'import.enter': {
    effect: 'write',
    grants: [released(studyLead('study'))],
    reveals: 'linked',
    whenLocked: 'refuse',
    records: 'import.entryRequested',
    onlyKind: 'earlierData',
  },
  // What the job does on behalf of the person who asked.
  'import.store': {
    effect: 'write',
    grants: [released(studyLead('study'))],
    reveals: 'linked',
    whenLocked: 'refuse',
    records: 'import.entered',
    onlyKind: 'earlierData',
  },
  // Which line of the file became which subject: for the site's own key file.
  'import.readCodes': {
    effect: 'read',
    grants: [released(studyLead('study'))],
    reveals: 'none',
    whenLocked: 'allow',
    records: 'import.codesDownloaded',
    onlyKind: 'earlierData',
  },
  'import.discard': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'allow',
    records: 'import.discarded',
    onlyKind: 'earlierData',
  },

  'lock.read': { effect: 'read', grants: team, reveals: 'none' },
  'lock.request': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'lock.requested',
  },
  'lock.withdraw': {
    effect: 'write',
    grants: [studyLead('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'lock.withdrawn',
  },
  'lock.return': {
    effect: 'write',
    grants: [oversight('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'lock.returned',
  },
  'lock.approve': {
    effect: 'write',
    grants: [oversight('study')],
    reveals: 'none',
    whenLocked: 'refuse',
    records: 'lock.approved',
    guard: 'exclusive',
  },

  'dataset.read': {
    effect: 'read',
    grants: [analyst('study'), released(studyLead('study'))],
    reveals: 'linked',
  },
  'analysis.list': {
    effect: 'read',
    grants: [analyst('study'), released(studyLead('study'))],
    reveals: 'linked',
  },
  'analysis.read': {
    effect: 'read',
    grants: [analyst('study'), released(studyLead('study'))],
    reveals: 'linked',
  },
  'analysis.run': {
    effect: 'write',
    grants: [analyst('study')],
    reveals: 'linked',
    whenLocked: 'allow',
    records: 'analysis.run',
  },
  'analysis.repeat': {
    effect: 'write',
    grants: [analyst('study')],
    reveals: 'linked',
    whenLocked: 'allow',
    records: 'analysis.repeated',
  },

  'report.list': { effect: 'read', grants: team, reveals: 'none' },
  'report.readOpen': {
    effect: 'read',
    grants: team,
    reveals: 'none',
    whenLocked: 'allow',
    records: 'report.openPartOpened',
  },
  'report.readClosed': {
    effect: 'read',
    grants: [oversight('study'), analyst('study')],
    reveals: 'linked',
    whenLocked: 'allow',
    records: 'report.closedPartOpened',
  },
  'report.issue': {
    effect: 'write',
    grants: [analyst('study')],
    reveals: 'linked',
    whenLocked: 'allow',
    records: 'report.requested',
  },
  // What the job does on behalf of the person who asked.
  'report.store': {
    effect: 'write',
    grants: [analyst('study')],
    reveals: 'linked',
    whenLocked: 'allow',
    records: 'report.issued',
  },
  'report.fail': {
    effect: 'write',
    grants: [analyst('study')],
    reveals: 'none',
    whenLocked: 'allow',
    records: 'report.failed',
  },

  'auditEvent.list': {
    effect: 'list',
    grants: [siteLead('ownSite'), studyLead('study'), oversight('study')],
    reveals: 'none',
  },
  'auditEvent.verify': {
    effect: 'read',
    grants: [studyLead('study'), oversight('study')],
    reveals: 'none',
  },

  'job.read': { effect: 'read', grants: starter, reveals: 'none' },
  'job.cancel': {
    effect: 'write',
    grants: starter,
    reveals: 'none',
    whenLocked: 'allow',
    records: 'job.cancelled',
  },
} as const satisfies Record<string, PolicyRow>

export type Action = keyof typeof POLICY
export const ACTIONS = Object.keys(POLICY) as Action[]

/** The row of an action with its optional columns. */
export const policyRow = (action: Action): PolicyRow => POLICY[action]
