import type { EntryValues } from '../../forms/entries.ts'
import type { BesideNews } from '../../ui/useBeside.ts'
import { planQuestionAt } from './planParts.ts'
import { attemptPlan, type PlanOutcome } from './planQuestion.ts'

export type PlanOrder = { part: string; ask: string; values: EntryValues }

/** Works out one plan beside the page, so that the page stays awake; the page ends it to cancel. */
self.onmessage = ({ data }: MessageEvent<PlanOrder>) => {
  const tell = (news: BesideNews<PlanOutcome>) => self.postMessage(news)
  const question = planQuestionAt(data.part, data.ask)
  if (!question) throw new Error(`No question ${data.part}/${data.ask}`)
  tell({ outcome: attemptPlan(question, data.values, (share) => tell({ share })) })
}
