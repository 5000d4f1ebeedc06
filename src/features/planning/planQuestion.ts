import type { PlanCurveData } from '#shared/figures/planCurveTypes.ts'
import type { PlanningMethod } from '#shared/statistics/planning/PLANNING_METHODS.ts'
import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import {
  type Entries,
  type EntryProblems,
  type EntryValues,
  readEntries,
} from '../../forms/entries.ts'

/** A figure of the answer in large type; the outcome gives it its sign. */
export type PlanFigure = { label: string; value: string; outcome?: 'present' | 'absent' }

/** Plain data, so that a worker can send it. */
export type PlanAnswer = {
  /** The answer in one sentence, with the number of each class. */
  sentence: string
  figures: readonly PlanFigure[]
  /** What a reader has to know beside the sentence. */
  notes: readonly string[]
  table: {
    caption: string
    columns: readonly { header: string; numeric?: boolean }[]
    rows: readonly (readonly string[])[]
  }
}

export type PlanWork = { answer: PlanAnswer; curve: PlanCurveData }

type Progress = (share: number) => void

type Definition<E extends Entries> = {
  /** Stands in the address. */
  ask: string
  /** In the choice of questions. */
  label: string
  /** The question itself. */
  title: string
  /** When to ask it, and what it takes for granted. */
  lead: string
  entries: E
  /** Entries that few plans need; folded away. */
  more?: readonly (keyof E & string)[]
  methods: readonly PlanningMethod[]
  /** Where a refusal by the statistics is shown. */
  blamed: keyof E & string
  /** Numbers that do not go together: what is wrong, at the box to change. */
  refuse?: (values: EntryValues<E>) => Partial<Record<keyof E, string>>
  /** Takes longer than a tenth of a second: runs beside the page. */
  slow?: true
  work: (values: EntryValues<E>, onProgress?: Progress) => PlanWork
}

/** A question of planning: its numbers, its answer, and the curve of what the answer depends on most. */
export type PlanQuestion = Omit<Definition<Entries>, 'refuse' | 'work'> & {
  judge: (texts: Readonly<Record<string, string>>) => PlanJudgement
  work: (values: EntryValues, onProgress?: Progress) => PlanWork
}

/** The numbers to work with, or what is wrong with them by box. */
export type PlanJudgement =
  | { values: EntryValues; problems: null }
  | { values: null; problems: EntryProblems }

/** A question whose work may rely on the types of its entries. */
export function planQuestion<E extends Entries>(definition: Definition<E>): PlanQuestion {
  const { refuse, work, ...rest } = definition
  return {
    ...rest,
    judge: (texts) => {
      const reading = readEntries(definition.entries, texts)
      if (reading.values === null) return reading
      const problems = definedOnly(refuse?.(reading.values) ?? {})
      return Object.keys(problems).length > 0 ? { values: null, problems } : reading
    },
    work: (values, onProgress) => work(values as EntryValues<E>, onProgress),
  }
}

function definedOnly(problems: Readonly<Record<string, string | undefined>>): EntryProblems {
  return Object.fromEntries(
    Object.entries(problems).flatMap(([name, text]) => (text === undefined ? [] : [[name, text]])),
  )
}

export type PlanOutcome =
  | { work: PlanWork; problems: null }
  | { work: null; problems: EntryProblems }

/** The work done, or the statistics' refusal at the box that it is about. Anything else is a fault. */
export function attemptPlan(
  question: PlanQuestion,
  values: EntryValues,
  onProgress?: Progress,
): PlanOutcome {
  try {
    return { work: question.work(values, onProgress), problems: null }
  } catch (error) {
    if (!(error instanceof StatisticsError)) throw error
    return { work: null, problems: { [question.blamed]: refusalWords(error) } }
  }
}

/** What the statistics refuse, followed by what to do about it. */
function refusalWords({ message }: StatisticsError): string {
  if (message.startsWith('No sample of a practicable size'))
    return 'No sample of a practicable size can tell these numbers apart. Give two that lie further from each other.'
  return `${message} Change this number.`
}
