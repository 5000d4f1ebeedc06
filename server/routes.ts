import { meRoutes } from './features/me/me.routes.ts'
import { subjectRoutes } from './features/subjects/subjects.routes.ts'
import type { Route } from './http/route.ts'

/** Every route of the API. The permission test walks this list. */
export const ROUTES: readonly Route[] = [...meRoutes, ...subjectRoutes]
