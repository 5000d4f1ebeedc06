import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { z } from 'zod'
import { id } from '#shared/schemas/common.ts'
import { subjectInput } from '#shared/schemas/subject.ts'
import { may, useStudy } from '../api/study.ts'
import { sitesQuery } from '../features/sites/sites.api.ts'
import { SubjectFields } from '../features/subjects/SubjectFields.tsx'
import { useEnrolSubject } from '../features/subjects/subjects.api.ts'
import { PRIVACY_WORDS } from '../features/subjects/subjectWords.ts'
import { Form } from '../forms/Form.tsx'
import { SelectField } from '../forms/SelectField.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

const enrolment = subjectInput.extend({
  siteId: z.uuid({ error: 'Please choose the site.' }).pipe(id),
})

/** Enrols one subject at a site. */
export default function EnrolSubjectPage() {
  const study = useStudy()
  const sites = useQuery(sitesQuery(study.id))
  return (
    <>
      <PageHead title="Enrol a subject" back={{ to: '../subjects', label: 'Subjects' }} />
      {sites.error && <ErrorNotice what="The sites could not be read" error={sites.error} />}
      {sites.isPending && <SheetSkeleton />}
      {sites.data && (
        <Enrolment
          sites={sites.data.filter((site) => may(study, 'subject.enrol', { siteId: site.id }))}
        />
      )}
    </>
  )
}

function Enrolment({ sites }: { sites: readonly { id: string; name: string }[] }) {
  const study = useStudy()
  const navigate = useNavigate()
  const enrol = useEnrolSubject(study.id)
  const only = sites.length === 1 ? sites[0]! : null
  const [defaults] = useState(() => ({
    id: crypto.randomUUID(),
    siteId: only?.id ?? '',
    sex: undefined,
    ageBand: undefined,
  }))
  if (sites.length === 0)
    return (
      <Sheet>
        <EmptyPlace title="Nobody can be enrolled from here">
          {study.lockedAt === null
            ? 'Your place in this study does not include it.'
            : 'The data of this study are locked.'}
        </EmptyPlace>
      </Sheet>
    )
  return (
    <Sheet
      label="About enrolling"
      margin={
        <>
          <p>
            The code is drawn at random when you enrol. Write it into your site file beside the
            person it belongs to: it is kept nowhere else.
          </p>
          <p>{PRIVACY_WORDS}</p>
        </>
      }
    >
      <Form
        schema={enrolment}
        defaultValues={defaults}
        submitLabel="Enrol the subject"
        busyLabel="Enrolling…"
        onSubmit={({ siteId, ...body }) => enrol.mutateAsync({ siteId, body })}
        onSaved={(subject) => navigate(`../subjects/${subject.id}`, { state: { enrolled: true } })}
        onCancel={() => navigate('../subjects')}
      >
        {only ? (
          <p>
            At <b>{only.name}</b>
          </p>
        ) : (
          <SelectField
            name="siteId"
            label="Site"
            options={sites.map((site) => ({ value: site.id, label: site.name }))}
          />
        )}
        <SubjectFields />
      </Form>
    </Sheet>
  )
}
