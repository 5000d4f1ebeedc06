import { EntryGrid } from '../../forms/EntryGrid.tsx'
import type { EntryProblems } from '../../forms/entries.ts'
import { Disclosure } from '../../ui/Disclosure.tsx'
import type { PlanTexts } from './planAddress.ts'
import type { PlanQuestion } from './planQuestion.ts'

type PlanEntriesFormProps = {
  question: PlanQuestion
  texts: PlanTexts
  problems: EntryProblems | null
  onText: (name: string, text: string) => void
}

/** The assumptions of a question; those that few plans need are folded unless something stands in them. */
export function PlanEntriesForm({ question, texts, problems, onText }: PlanEntriesFormProps) {
  const { entries, more = [] } = question
  const names = Object.keys(entries).filter((name) => !more.includes(name))
  const inUse = more.some((name) => texts[name] !== entries[name]!.start)
  const grid = (shown: readonly string[]) => (
    <EntryGrid entries={entries} names={shown} texts={texts} problems={problems} onText={onText} />
  )
  return (
    <div className="print:hidden">
      {grid(names)}
      {more.length > 0 && (
        <div className="mt-5">
          <Disclosure
            summary={more.includes('reach') ? 'Enrolment, and a smaller study' : 'Enrolment'}
            startsOpen={inUse}
          >
            <div className="pt-2">{grid(more)}</div>
          </Disclosure>
        </div>
      )}
    </div>
  )
}
