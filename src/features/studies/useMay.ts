import type { Action } from '#shared/policy/permissions.ts'
import { may, useStudy } from '../../api/study.ts'

/**
 * Whether the reader may do something in the study around this page, so that no button offers what
 * the server would refuse. Of something at one site: say which.
 */
export function useMay(action: Action, record: { siteId?: string | null } = {}): boolean {
  return may(useStudy(), action, record)
}
