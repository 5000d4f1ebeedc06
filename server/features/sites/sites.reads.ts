import { asc, count, eq, type SQL } from 'drizzle-orm'
import type { Reader } from '#db/client.ts'
import { sites } from '#db/schema/sites.ts'
import { subjects } from '#db/schema/subjects.ts'
import { AppError } from '#shared/errors/AppError.ts'
import type { Site } from '#shared/schemas/site.ts'

/** One site. @throws AppError not-found */
export async function getSite(read: Reader, siteId: string): Promise<Site> {
  const [row] = await sitesWhere(read, eq(sites.id, siteId))
  if (!row) throw new AppError('not-found')
  return row
}

/** All sites of a study by name. */
export const listSites = (read: Reader, studyId: string): Promise<Site[]> =>
  sitesWhere(read, eq(sites.studyId, studyId))

const sitesWhere = (read: Reader, condition: SQL): Promise<Site[]> =>
  read
    .select({
      id: sites.id,
      name: sites.name,
      prefix: sites.prefix,
      plannedSubjects: sites.plannedSubjects,
      version: sites.version,
      subjectCount: count(subjects.id),
    })
    .from(sites)
    .leftJoin(subjects, eq(subjects.siteId, sites.id))
    .where(condition)
    .groupBy(sites.id)
    .orderBy(asc(sites.name))
