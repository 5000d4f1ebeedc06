import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { useRef, useState } from 'react'
import { auditEventPage, type ChainVerdict, chainVerdict } from '#shared/schemas/auditEvent.ts'
import { request } from '../../api/http.ts'
import { studyKey } from '../../api/study.ts'

type TrailRequest = Readonly<Record<string, string | undefined>>

const trailPath = (studyId: string) => `/api/studies/${studyId}/audit-events`

export const auditEventsQuery = (studyId: string, query: TrailRequest) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'auditEvents', query],
    queryFn: ({ signal }) => request(auditEventPage, 'get', trailPath(studyId), { query, signal }),
    placeholderData: keepPreviousData,
  })

/** Far beyond every event: the answer carries number and head of the chain and walks nothing. */
const PAST_THE_END = 999_999_999_999_999

export const chainHeadQuery = (studyId: string) =>
  queryOptions({
    queryKey: [...studyKey(studyId), 'chainHead'],
    queryFn: ({ signal }) =>
      request(chainVerdict, 'get', `${trailPath(studyId)}/verify`, {
        query: { after: PAST_THE_END, most: 1 },
        signal,
      }),
  })

/** A few seconds at most for each request, so that the progress moves. */
const EVENTS_A_REQUEST = 4_000

/** Checks the chain stretch by stretch and tells how far it is. */
export function useVerifyChain(studyId: string) {
  const queries = useQueryClient()
  const [progress, setProgress] = useState<{ checked: number; count: number } | null>(null)
  const stop = useRef<AbortController>(null)
  const check = useMutation({
    meta: { quiet: true },
    mutationFn: async (): Promise<ChainVerdict> => {
      stop.current = new AbortController()
      let verdict: ChainVerdict | undefined
      let redacted = 0
      do {
        verdict = await request(chainVerdict, 'get', `${trailPath(studyId)}/verify`, {
          query: { after: verdict?.checkedTo ?? 0, most: EVENTS_A_REQUEST },
          signal: stop.current.signal,
        })
        redacted += verdict.redacted
        setProgress({ checked: verdict.checkedTo, count: verdict.count })
      } while (verdict.intact && verdict.checkedTo < verdict.count)
      return { ...verdict, redacted }
    },
    onSettled: () => {
      setProgress(null)
      return queries.invalidateQueries({ queryKey: chainHeadQuery(studyId).queryKey })
    },
  })
  return { ...check, progress, stop: () => stop.current?.abort() }
}
