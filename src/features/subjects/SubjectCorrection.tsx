import { useState } from 'react'
import type { z } from 'zod'
import { type Subject, subjectCorrection } from '#shared/schemas/subject.ts'
import { ChangedMeanwhile, isChangedMeanwhile } from '../../forms/ChangedMeanwhile.tsx'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
import { rebased } from '../../forms/rebased.ts'
import { SubjectFields } from './SubjectFields.tsx'
import { useCorrectSubject } from './subjects.api.ts'
import { ageBandWords, sexWords } from './subjectWords.ts'

const correction = subjectCorrection.omit({ version: true })

type SubjectCorrectionProps = {
  studyId: string
  /** The subject as it stands now. */
  subject: Subject
  onDone: () => void
}

/** Corrects what was recorded, with the reason, in place. */
export function SubjectCorrection({ studyId, subject, onDone }: SubjectCorrectionProps) {
  const [seen] = useState(subject)
  const correct = useCorrectSubject(studyId, subject.id)
  const [mine, setMine] = useState<z.output<typeof correction> | null>(null)
  const save = (values: z.output<typeof correction>) =>
    correct.mutateAsync({ ...values, version: seen.version }).catch((error) => {
      setMine(isChangedMeanwhile(error) ? values : null)
      throw error
    })
  const onTop = mine && subject.version !== seen.version ? rebased(mine, seen, subject) : null
  return (
    <>
      {onTop && (
        <ChangedMeanwhile
          what="this subject"
          rows={[
            { label: 'Sex', mine: sexWords(onTop.sex), stored: sexWords(subject.sex) },
            {
              label: 'Age band',
              mine: ageBandWords(onTop.ageBand),
              stored: ageBandWords(subject.ageBand),
            },
          ]}
          onKeepMine={() =>
            correct.mutateAsync({ ...onTop, version: subject.version }).then(onDone)
          }
          onKeepStored={onDone}
        />
      )}
      <Form
        schema={correction}
        defaultValues={{
          sex: seen.sex ?? undefined,
          ageBand: seen.ageBand ?? undefined,
          reasonForChange: '',
        }}
        takesFocus
        submitLabel="Save the correction"
        onSubmit={save}
        onSaved={onDone}
        onCancel={onDone}
      >
        <SubjectFields />
        <ReasonField />
      </Form>
    </>
  )
}
