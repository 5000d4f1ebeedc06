import { analysisRoutes } from './features/analyses/analyses.routes.ts'
import { precisionRoutes } from './features/analyses/precision.routes.ts'
import { analyteRoutes } from './features/analytes/analytes.routes.ts'
import { auditEventRoutes } from './features/auditEvents/auditEvents.routes.ts'
import { datasetRoutes } from './features/datasets/datasets.routes.ts'
import { importRoutes } from './features/imports/imports.routes.ts'
import { jobRoutes } from './features/jobs/jobs.routes.ts'
import { lockRoutes } from './features/locks/locks.routes.ts'
import { meRoutes } from './features/me/me.routes.ts'
import { memberRoutes } from './features/members/members.routes.ts'
import { protocolRoutes } from './features/protocol/protocol.routes.ts'
import { referenceRoutes } from './features/reference/reference.routes.ts'
import { reportRoutes } from './features/reports/reports.routes.ts'
import { sessionRoutes } from './features/sessions/sessions.routes.ts'
import { siteRoutes } from './features/sites/sites.routes.ts'
import { studyRoutes } from './features/studies/studies.routes.ts'
import { subjectRoutes } from './features/subjects/subjects.routes.ts'
import type { Route } from './http/route.ts'

/** Every route of the API. The permission test walks this list. */
export const ROUTES: readonly Route[] = [
  ...analysisRoutes,
  ...precisionRoutes,
  ...auditEventRoutes,
  ...meRoutes,
  ...analyteRoutes,
  ...datasetRoutes,
  ...importRoutes,
  ...jobRoutes,
  ...lockRoutes,
  ...memberRoutes,
  ...protocolRoutes,
  ...referenceRoutes,
  ...reportRoutes,
  ...sessionRoutes,
  ...siteRoutes,
  ...studyRoutes,
  ...subjectRoutes,
]
