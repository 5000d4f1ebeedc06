import type { ProtocolDocument } from '#shared/schemas/protocol.ts'
import { type Api, aKey } from './api.ts'
import { fillStudy, type GivenSubject, lockThroughHttp, teamOf } from './earlierData.ts'

/** A locked study with its team, and the ways to have an analysis computed on it. */
export async function lockedStudy(api: Api, given: GivenSubject[], protocol?: ProtocolDocument) {
  const study = await api.given.study(protocol ? { protocol } : {})
  await fillStudy(api, study, given)
  const team = await teamOf(api, study)
  const { datasetId, datasetHash } = await lockThroughHttp(api, study, team)
  const request = (parameters: object) => ({ id: aKey(), datasetId, title: 'Ammonia', parameters })
  const post = (path: string, body: object) =>
    api.as(team.analyst).post(`/api/studies/${study.id}/${path}`).send(body)
  return {
    study,
    datasetId,
    datasetHash,
    ...team,
    /** Computed at once. */
    run: (parameters: object) => post('analyses', request(parameters)),
    /** Asked for, and not yet worked on. */
    ask: (parameters: object) => post('analysis-runs', request(parameters)),
    runs: async () =>
      (await api.as(team.analyst).get(`/api/studies/${study.id}/analysis-runs`).expect(200)).body,
    /** Asked for, worked off the queue, and read. */
    runLong: async (parameters: object) => {
      const asked = await post('analysis-runs', request(parameters)).expect(202)
      await api.runJobs()
      return (await api.as(team.analyst).get(`/api/analyses/${asked.body.id}`).expect(200)).body
    },
  }
}
