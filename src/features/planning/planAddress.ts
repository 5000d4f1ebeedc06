import type { PlanQuestion } from './planQuestion.ts'

export type PlanTexts = Readonly<Record<string, string>>

/** What stands in the boxes: from the address, and the start of a box that the address does not name. */
export function textsFromAddress(question: PlanQuestion, search: URLSearchParams): PlanTexts {
  return Object.fromEntries(
    Object.entries(question.entries).map(([name, { start }]) => [name, search.get(name) ?? start]),
  )
}

/** The question and every number that differs from its start, so that a link stays short. */
export function addressOf(question: PlanQuestion, texts: PlanTexts): Record<string, string> {
  const changed = Object.entries(question.entries).flatMap(([name, { start }]) =>
    texts[name] === undefined || texts[name] === start ? [] : [[name, texts[name]] as const],
  )
  return { ask: question.ask, ...Object.fromEntries(changed) }
}
