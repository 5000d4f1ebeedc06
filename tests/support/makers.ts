import { randomBytes, randomUUID } from 'node:crypto'
import { eq } from 'drizzle-orm'
import type { Database } from '#db/client.ts'
import { analytes } from '#db/schema/analytes.ts'
import { auditChains } from '#db/schema/auditChains.ts'
import { logins } from '#db/schema/logins.ts'
import { members } from '#db/schema/members.ts'
import { people } from '#db/schema/people.ts'
import { protocolVersions } from '#db/schema/protocolVersions.ts'
import { sites } from '#db/schema/sites.ts'
import { studies } from '#db/schema/studies.ts'
import { studyGuards } from '#db/schema/studyGuards.ts'
import { subjects } from '#db/schema/subjects.ts'
import { sha256Hex } from '#server/changes/hash.ts'
import type { Duty, Role, StudyKind } from '#shared/policy/people.ts'
import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { subjectCode } from '#shared/terms/subjectCode.ts'
import type { TestPerson } from './api.ts'

const HOUR_MS = 3_600_000

/** An invented protocol, said to be so. */
export const inventedProtocol: ProtocolDocument = {
  targetCondition: 'Invented condition',
  referenceStandard: 'Invented reference standard',
  sampling: 'cohort',
  regulatoryStatus: 'researchUse',
  plannedSubjects: 100,
  primaryAnalyteKey: 'ammonia',
  biomarkers: [{ analyteKey: 'ammonia', direction: 'higher', plannedCutOff: 1000 }],
  acceptanceLimits: [{ analyteKey: 'ammonia', lower: -100, upper: 100 }],
}

/** Makers of rows that a test stands on, each with sensible defaults. */
export function makers(database: Database) {
  const now = () => new Date()
  let subjectNumber = 1000

  async function person(options: { name?: string; roles?: Role[] } = {}): Promise<TestPerson> {
    const id = randomUUID()
    const secret = randomBytes(32).toString('base64url')
    const name = options.name ?? 'A person'
    const roles = options.roles ?? ['coordinator', 'monitor', 'analyst']
    await database.insert(people).values({
      id,
      issuer: 'https://provider.example',
      subject: id,
      name,
      email: `${id}@hospital.example`,
      roles,
      firstSeenAt: now(),
      lastSeenAt: now(),
    })
    await database.insert(logins).values({
      idHash: sha256Hex(secret),
      personId: id,
      startedAt: now(),
      lastSeenAt: now(),
      endsAt: new Date(Date.now() + HOUR_MS),
      authenticatedAt: now(),
    })
    return { id, name, secret }
  }

  async function study(
    options: {
      kind?: StudyKind
      code?: string
      locked?: boolean
      released?: boolean
      protocol?: ProtocolDocument
    } = {},
  ) {
    const id = randomUUID()
    const code = options.code ?? `TEST-${id.slice(0, 8).toUpperCase()}`
    const createdAt = now()
    const base = { studyId: id, version: 1, createdAt }
    await database.insert(studies).values({
      id,
      code,
      title: 'Invented study',
      kind: options.kind ?? 'earlierData',
      createdAt,
      createdBy: randomUUID(),
      releasedAt: options.released ? createdAt : null,
    })
    await database.insert(studyGuards).values({ studyId: id, lockedAt: null })
    await database.insert(auditChains).values({ id, count: 0, headHash: '0'.repeat(64) })
    const document = options.protocol ?? inventedProtocol
    const protocolVersionId = randomUUID()
    await database.insert(protocolVersions).values({
      ...base,
      id: protocolVersionId,
      number: 1,
      document,
      documentHash: sha256Hex(JSON.stringify(document)),
      createdBy: randomUUID(),
    })
    const north = {
      ...base,
      id: randomUUID(),
      prefix: 'N04',
      name: 'North ward',
      plannedSubjects: 60,
    }
    const south = {
      ...base,
      id: randomUUID(),
      prefix: 'N02',
      name: 'South clinic',
      plannedSubjects: 40,
    }
    await database.insert(sites).values([north, south])
    const ammonia = { ...base, id: randomUUID(), key: 'ammonia', name: 'Ammonia', unit: '[ppb]' }
    const acetone = { ...base, id: randomUUID(), key: 'acetone', name: 'Acetone', unit: '[ppb]' }
    await database.insert(analytes).values([ammonia, acetone])
    const made = { id, code, north, south, ammonia, acetone, protocolVersionId }
    if (options.locked) await lock(made)
    return made
  }

  /** Locks a study's data as an approved final lock would. */
  async function lock(of: { id: string }): Promise<void> {
    await database
      .update(studyGuards)
      .set({ lockedAt: now() })
      .where(eq(studyGuards.studyId, of.id))
  }

  type Line = { role: Role; duty?: Duty | null; site?: { id: string } | null; person?: TestPerson }

  /** A line of the team list, with its key and the person in it. */
  async function memberLine(of: { id: string }, options: Line) {
    const who = options.person ?? (await person({ roles: [options.role] }))
    const id = randomUUID()
    await database.insert(members).values({
      id,
      studyId: of.id,
      createdAt: now(),
      personId: who.id,
      role: options.role,
      duty: options.duty ?? null,
      siteId: options.site?.id ?? null,
      startsAt: new Date(Date.now() - HOUR_MS),
    })
    return { id, person: who }
  }

  /** Somebody in the team of a study. */
  const member = async (of: { id: string }, options: Line): Promise<TestPerson> =>
    (await memberLine(of, options)).person

  async function endLine(line: { id: string }): Promise<void> {
    await database
      .update(members)
      .set({ endsAt: new Date(Date.now() - 1000) })
      .where(eq(members.id, line.id))
  }

  async function subject(of: { id: string }, site: { id: string; prefix: string }) {
    let code: string | null = null
    while (code === null) code = subjectCode(site.prefix, String(subjectNumber++))
    const row = {
      id: randomUUID(),
      studyId: of.id,
      siteId: site.id,
      code,
      sex: 'F' as const,
      ageBand: '50-54' as const,
      enrolledAt: now(),
      createdAt: now(),
      covariates: {},
    }
    await database.insert(subjects).values(row)
    return { ...row, version: 1 }
  }

  return { person, study, lock, member, memberLine, endLine, subject }
}
