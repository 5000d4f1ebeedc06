import { useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { CAUTIONS } from '#shared/terms/cautions.ts'
import { BesideProgress } from '../../ui/BesideProgress.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { PlanAnswerTable, PlanAnswerView } from './PlanAnswerView.tsx'
import { PlanCurvePanel } from './PlanCurvePanel.tsx'
import { PlanEntriesForm } from './PlanEntriesForm.tsx'
import { PlanProtocol } from './PlanProtocol.tsx'
import { addressOf, textsFromAddress } from './planAddress.ts'
import type { PlanQuestion, PlanWork } from './planQuestion.ts'
import { assumptionsOf, methodsOf, protocolWords } from './protocolWords.ts'
import { type PlanState, usePlanOutcome } from './usePlanOutcome.ts'

type PlanWorkspaceProps = { part: string; question: PlanQuestion }

/** One question: its assumptions on the left, the answer and its curve on the right. */
export function PlanWorkspace({ part, question }: PlanWorkspaceProps) {
  const [search, setSearch] = useSearchParams()
  const [texts, setTexts] = useState(() => textsFromAddress(question, search))
  const state = usePlanOutcome(part, question, texts)
  const change = (name: string, text: string) => {
    const next = { ...texts, [name]: text }
    setTexts(next)
    setSearch(addressOf(question, next), { replace: true, preventScrollReset: true })
  }
  const assumptions = assumptionsOf(question, texts)
  const provenance = [
    `${CAUTIONS.researchUse.title}. ${CAUTIONS.researchUse.text}`,
    question.title,
    ...assumptions.map(({ term, value }) => `${term}: ${value}`),
    ...methodsOf(question),
  ]
  return (
    <>
      <h2 className="text-xl">{question.title}</h2>
      <p className="mb-5 max-w-[80ch] text-ink-2">{question.lead}</p>
      {/* One column: assumptions, answer, table. Two: the table stands under the assumptions. */}
      <div className="grid gap-x-[34px] gap-y-6 wide:grid-cols-[minmax(0,0.85fr)_minmax(0,1fr)] wide:grid-rows-[auto_1fr]">
        <div className="min-w-0">
          <PlanEntriesForm
            question={question}
            texts={texts}
            problems={state.problems}
            onText={change}
          />
          <div className="hidden print:block">
            <Facts items={assumptions} layout="rows" />
          </div>
        </div>
        <div className="min-w-0 wide:row-span-2" aria-live="polite">
          {state.work ? (
            <Worked work={state.work} provenance={provenance} />
          ) : (
            <NotWorked state={state} />
          )}
        </div>
        {state.work && (
          <div className="min-w-0">
            <PlanAnswerTable answer={state.work.answer} />
          </div>
        )}
      </div>
      {state.work && <PlanProtocol words={protocolWords(question, texts, state.work.answer)} />}
    </>
  )
}

function Worked({ work, provenance }: { work: PlanWork; provenance: readonly string[] }) {
  return (
    <>
      <PlanAnswerView answer={work.answer} />
      <div className="mt-6">
        <PlanCurvePanel curve={work.curve} provenance={provenance} />
      </div>
    </>
  )
}

function NotWorked({ state }: { state: PlanState }) {
  if ('beside' in state) return <BesideProgress label="Searching the numbers" work={state.beside} />
  return (
    <Notice tone="warn" title="No answer yet">
      Mend the numbers that are marked on this page.
    </Notice>
  )
}
