import { formatInstant } from '#shared/terms/numbers.ts'

/** What travels with every file of numbers: caution, dataset, and how the numbers came about. */
export function provenanceLines(of: {
  caution: { title: string; text: string }
  studyCode: string
  datasetHash: string
  stored: { number: number; runAt: string; runByName: string; statisticsVersion: string } | null
}): string[] {
  const { caution, studyCode, datasetHash, stored } = of
  return [
    `${caution.title}. ${caution.text}`,
    `Study ${studyCode}, dataset SHA-256 ${datasetHash}`,
    stored
      ? `Stored analysis no. ${stored.number}, run ${formatInstant(stored.runAt)} by ${stored.runByName}, statistics ${stored.statisticsVersion}`
      : 'Explored, not stored: not a result of the study',
  ]
}
