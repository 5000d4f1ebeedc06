import type { Subject } from '#shared/schemas/subject.ts'
import { Facts } from '../../ui/Facts.tsx'
import { ageBandWords, sexWords } from './subjectWords.ts'

/** What is recorded of a subject, covariates by their own keys. */
export function SubjectFacts({ subject }: { subject: Subject }) {
  return (
    <Facts
      layout="rows"
      items={[
        { term: 'Sex', value: sexWords(subject.sex) },
        { term: 'Age band, years', value: ageBandWords(subject.ageBand) },
        ...Object.entries(subject.covariates).map(([key, value]) => ({
          term: key,
          value: String(value),
        })),
      ]}
    />
  )
}
