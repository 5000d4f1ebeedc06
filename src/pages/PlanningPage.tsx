import { Navigate, useParams, useSearchParams } from 'react-router-dom'
import { PLANNING_METHODS } from '#shared/statistics/planning/PLANNING_METHODS.ts'
import { statisticsVersion } from '#shared/statistics/statisticsVersion.ts'
import { CAUTIONS, LOCAL_PROTOCOL } from '#shared/terms/cautions.ts'
import { PlanWorkspace } from '../features/planning/PlanWorkspace.tsx'
import { PLAN_PARTS } from '../features/planning/planParts.ts'
import type { PlanQuestion } from '../features/planning/planQuestion.ts'
import { QuestionChoice } from '../features/planning/QuestionChoice.tsx'
import { Caution } from '../ui/Caution.tsx'
import { Facts } from '../ui/Facts.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { SegmentedLinks } from '../ui/SegmentedLinks.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** Sample sizes and what sensor noise does to them; needs no study and stores nothing. */
export default function PlanningPage() {
  const { part: key } = useParams()
  const [search, setSearch] = useSearchParams()
  const part = PLAN_PARTS.find((each) => each.key === key)
  if (!part) return <Navigate to={`/planning/${PLAN_PARTS[0].key}`} replace />
  const { questions } = part
  const question = questions.find(({ ask }) => ask === search.get('ask')) ?? questions[0]
  return (
    <>
      <PageHead
        title="Plan a study"
        sub="How many subjects a question needs. Nothing on this page is stored."
        back={{ to: '/', label: 'Your studies' }}
      />
      <SegmentedLinks
        label="What is planned"
        items={PLAN_PARTS.map((each) => ({ to: `/planning/${each.key}`, label: each.label }))}
      />
      <Sheet margin={<Margin question={question} />}>
        <QuestionChoice
          questions={questions}
          value={question.ask}
          onChange={(ask) => setSearch({ ask }, { preventScrollReset: true })}
        />
        <PlanWorkspace key={`${part.key} ${question.ask}`} part={part.key} question={question} />
      </Sheet>
    </>
  )
}

function Margin({ question }: { question: PlanQuestion }) {
  return (
    <>
      <Caution title={CAUTIONS.researchUse.title}>
        {CAUTIONS.researchUse.text} {LOCAL_PROTOCOL}
      </Caution>
      <Facts
        items={[
          ...question.methods.map((method) => ({
            term: PLANNING_METHODS[method].name,
            value: PLANNING_METHODS[method].source,
          })),
          { term: 'Computed', value: `In this browser, statistics ${statisticsVersion}` },
        ]}
      />
      <p>
        The numbers stand in the page’s address, so that a link shows the same plan. They are kept
        nowhere else.
      </p>
    </>
  )
}
