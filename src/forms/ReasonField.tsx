import { useState } from 'react'
import { useController } from 'react-hook-form'
import { FieldFrame } from './FieldFrame.tsx'

const USUAL_REASONS = [
  'Typing mistake',
  'Read from the wrong row or column',
  'The source record was corrected',
  'Answer to a data query',
]
const OTHER = 'Another reason'

type ReasonFieldProps = {
  name?: string
  label?: string
  reasons?: readonly string[]
}

/** Why a saved record changes: one of a list and own words, kept as one sentence. */
export function ReasonField({
  name = 'reasonForChange',
  label = 'Reason for the change',
  reasons = USUAL_REASONS,
}: ReasonFieldProps) {
  const { field } = useController({ name })
  const [choice, setChoice] = useState('')
  const [words, setWords] = useState('')
  const change = (nextChoice: string, nextWords: string) => {
    setChoice(nextChoice)
    setWords(nextWords)
    field.onChange(sentenceOf(nextChoice, nextWords))
  }
  return (
    <FieldFrame
      name={name}
      label={label}
      hint="It is kept in the audit trail with your name. Write nothing that identifies a person."
      group
    >
      {({ id, ...state }) => (
        <div className="grid max-w-2xl gap-3 tablet:grid-cols-[1fr_1.4fr]">
          <select
            {...state}
            aria-label={`${label}: kind`}
            value={choice}
            onChange={(event) => change(event.target.value, words)}
            className="control"
          >
            <option value="">Choose</option>
            {[...reasons, OTHER].map((reason) => (
              <option key={reason} value={reason}>
                {reason}
              </option>
            ))}
          </select>
          <input
            {...state}
            id={`${id}-words`}
            aria-label={`${label}: in your own words${choice === OTHER ? '' : ' (optional)'}`}
            placeholder={choice === OTHER ? 'In your own words' : 'In your own words (optional)'}
            value={words}
            onChange={(event) => change(choice, event.target.value)}
            onBlur={field.onBlur}
            className="control"
          />
        </div>
      )}
    </FieldFrame>
  )
}

/** Nothing chosen is no reason; "another reason" without words is none either. */
function sentenceOf(choice: string, words: string): string {
  const said = words.trim()
  if (choice === '') return ''
  if (choice === OTHER) return said
  return said === '' ? choice : `${choice}: ${said}`
}
