import type { DatasetManifest } from '#shared/schemas/dataset.ts'

type Analyte = DatasetManifest['analytes'][number]

/** An analyte of the dataset, asked for by a key that was checked before. */
export function frozenAnalyteOf(analytes: readonly Analyte[], key: string): Analyte {
  const found = analytes.find((analyte) => analyte.key === key)
  if (!found) throw new Error(`The dataset holds no ${key}.`)
  return found
}
