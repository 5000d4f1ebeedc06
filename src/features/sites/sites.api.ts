import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type SiteCorrection, type SiteInput, site } from '#shared/schemas/site.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

export const sitesQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'sites'],
    queryFn: ({ signal }) =>
      request(z.array(site), 'get', `/api/studies/${studyId}/sites`, { signal }),
  })

export function useAddSite(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: (body: SiteInput) =>
      request(site, 'post', `/api/studies/${studyId}/sites`, { body }),
    onSuccess: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}

export function useCorrectSite(studyId: string) {
  const queries = useQueryClient()
  return useMutation({
    mutationFn: ({ siteId, body }: { siteId: string; body: SiteCorrection }) =>
      request(site, 'patch', `/api/sites/${siteId}`, { body }),
    // After a refusal too: the reader has to see what stands there now.
    onSettled: () => queries.invalidateQueries({ queryKey: studyKey(studyId) }),
  })
}
