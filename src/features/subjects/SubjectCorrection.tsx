import { useState } from 'react'
import { type Subject, subjectCorrection } from '#shared/schemas/subject.ts'
import { ChangedMeanwhile, isChangedMeanwhile } from '../../forms/ChangedMeanwhile.tsx'
import { Form } from '../../forms/Form.tsx'
import { ReasonField } from '../../forms/ReasonField.tsx'
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
  const mine = correct.variables
  const overtaken = isChangedMeanwhile(correct.error) && subject.version !== seen.version
  return (
    <>
      {overtaken && mine && (
        <ChangedMeanwhile
          what="this subject"
          rows={[
            { label: 'Sex', mine: sexWords(mine.sex), stored: sexWords(subject.sex) },
            {
              label: 'Age band',
              mine: ageBandWords(mine.ageBand),
              stored: ageBandWords(subject.ageBand),
            },
          ]}
          onKeepMine={() =>
            correct.mutate({ ...mine, version: subject.version }, { onSuccess: onDone })
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
        submitLabel="Save the correction"
        onSubmit={(values) => correct.mutateAsync({ ...values, version: seen.version })}
        onSaved={onDone}
        onCancel={onDone}
      >
        <SubjectFields />
        <ReasonField />
      </Form>
    </>
  )
}
