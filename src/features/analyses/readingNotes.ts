import type { AgreementCounts } from '#shared/schemas/dataset.ts'
import { formatCount } from '#shared/terms/numbers.ts'

/** What is to be known of the readings that precision is computed from, as short sentences. */
export function readingNotes({ pairs, severalSessions, belowLod }: AgreementCounts): string[] {
  return [
    `${formatCount(pairs)} readings, ${formatCount(severalSessions)} subjects with several sessions`,
    ...(belowLod > 0
      ? [`${formatCount(belowLod)} below the limit of detection, used as given`]
      : []),
  ]
}
