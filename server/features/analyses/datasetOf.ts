import { reader } from '#db/client.ts'
import { type DatasetRecord, getDataset } from '#server/features/datasets/datasets.reads.ts'
import { AppError, refuseField } from '#shared/errors/AppError.ts'

/** A dataset of this study; another study’s is as if it did not exist. @throws AppError invalid */
export async function datasetOf(studyId: string, datasetId: string): Promise<DatasetRecord> {
  const dataset = await getDataset(reader(), datasetId).catch((error: unknown) => {
    if (error instanceof AppError && error.code === 'not-found') return undefined
    throw error
  })
  if (dataset?.studyId !== studyId) refuseField('datasetId', 'This study has no such dataset.')
  return dataset
}
