import { PLANNING_METHODS } from '#shared/statistics/planning/PLANNING_METHODS.ts'
import { statisticsVersion } from '#shared/statistics/statisticsVersion.ts'
import type { PlanTexts } from './planAddress.ts'
import type { PlanAnswer, PlanQuestion } from './planQuestion.ts'

/** Every number of the plan as it was typed, with what it is; boxes left blank are left out. */
export function assumptionsOf(
  { entries }: PlanQuestion,
  texts: PlanTexts,
): { term: string; value: string }[] {
  return Object.entries(entries).flatMap(([name, { label, unit, start }]) => {
    const text = (texts[name] ?? start).trim()
    return text === '' ? [] : [{ term: label, value: unit ? `${text} ${unit}` : text }]
  })
}

/** "Buderer (Buderer 1996, Acad Emerg Med 3:895)". */
export const methodsOf = ({ methods }: PlanQuestion): string[] =>
  methods.map((key) => `${PLANNING_METHODS[key].name} (${PLANNING_METHODS[key].source})`)

/** A paragraph for the protocol: question, answer, assumptions, methods. */
export function protocolWords(
  question: PlanQuestion,
  texts: PlanTexts,
  answer: PlanAnswer,
): string {
  const assumptions = assumptionsOf(question, texts).map(({ term, value }) => `${term} = ${value}`)
  return [
    question.title,
    [answer.sentence, ...answer.notes].join(' '),
    `Assumptions: ${assumptions.join('; ')}.`,
    `Methods: ${methodsOf(question).join('; ')}. Computed with Breathmark, statistics ${statisticsVersion}.`,
  ].join('\n')
}
