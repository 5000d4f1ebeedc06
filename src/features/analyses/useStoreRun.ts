import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { drawsOf } from '#shared/analyses/drawsOf.ts'
import type { AnalysisParameters } from '#shared/schemas/analysis.ts'
import { useAskForRun, useRunAnalysis } from './analyses.api.ts'

/** Has an analysis computed and stored, at once or as a run, and goes to its page. */
export function useStoreRun(studyId: string, datasetId: string) {
  const navigate = useNavigate()
  const run = useRunAnalysis(studyId)
  const ask = useAskForRun(studyId)
  const [id, setId] = useState(() => crypto.randomUUID())
  return {
    store: async (title: string, parameters: AnalysisParameters) => {
      const draws = drawsOf(parameters) !== null
      await (draws ? ask : run).mutateAsync({ id, datasetId, title, parameters })
      return id
    },
    open: (stored: string) => {
      setId(crypto.randomUUID())
      return navigate(`/studies/${studyId}/results/${stored}`)
    },
  }
}
