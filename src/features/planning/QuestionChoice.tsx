import { Segments } from '../../ui/Segments.tsx'
import type { PlanQuestion } from './planQuestion.ts'

type QuestionChoiceProps = {
  questions: readonly PlanQuestion[]
  value: string
  onChange: (ask: string) => void
}

/** The questions of a part, all at once where there is room, and a list to choose from on a phone. */
export function QuestionChoice({ questions, value, onChange }: QuestionChoiceProps) {
  if (questions.length < 2) return null
  const options = questions.map(({ ask, label }) => ({ value: ask, label }))
  return (
    <div className="mb-5 print:hidden">
      <div className="max-tablet:hidden">
        <Segments label="Question" hideLabel options={options} value={value} onChange={onChange} />
      </div>
      <select
        aria-label="Question"
        className="control tablet:hidden"
        value={value}
        onChange={(event) => onChange(event.target.value)}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    </div>
  )
}
