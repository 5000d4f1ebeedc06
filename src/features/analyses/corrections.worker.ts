import { cutOffCorrectionsOf } from '#shared/analyses/cutOffCorrectionsOf.ts'
import type { CutOffCorrections } from '#shared/schemas/accuracyMore.ts'
import type { ResamplingChoice } from '#shared/schemas/resampling.ts'
import type { Direction } from '#shared/terms/protocol.ts'
import type { BesideNews } from '../../ui/useBeside.ts'

export type CorrectionOrder = {
  values: {
    present: readonly number[]
    absent: readonly number[]
    presentSubjects: readonly number[] | null
  }
  direction: Direction
  resampling: ResamplingChoice
}

/** Draws beside the page, so that the cut-off still moves; the page ends it to cancel. */
self.onmessage = ({ data: { values, direction, resampling } }: MessageEvent<CorrectionOrder>) => {
  const tell = (news: BesideNews<CutOffCorrections>) => self.postMessage(news)
  tell({
    outcome: cutOffCorrectionsOf(values, direction, resampling, (share) => tell({ share })),
  })
}
