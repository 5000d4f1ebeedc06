import Papa from 'papaparse'
import type { BesideNews } from '../../ui/useBeside.ts'
import { type AllanOutcome, allanOf } from './allanOf.ts'
import { seriesReader } from './seriesReader.ts'

export type SeriesOrder = { file: File; delimiter: string; column: string }

/** Reads a file piece by piece and works out its Allan deviations, beside the page. */
self.onmessage = ({ data: { file, delimiter, column } }: MessageEvent<SeriesOrder>) => {
  const tell = (news: BesideNews<AllanOutcome>) => self.postMessage(news)
  const reader = seriesReader(column)
  Papa.parse<string[]>(file, {
    skipEmptyLines: false,
    delimiter,
    chunk: ({ data, meta }) => {
      reader.take(data)
      // Reading is nearly all of the work.
      tell({ share: (0.9 * meta.cursor) / file.size })
    },
    complete: () => tell({ outcome: allanOf(reader.series()) }),
    error: () => {
      throw new Error('The file could not be read')
    },
  })
}
