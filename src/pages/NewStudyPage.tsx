import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useFormContext, useWatch } from 'react-hook-form'
import { useNavigate } from 'react-router-dom'
import { permitsInstallation } from '#shared/policy/permits.ts'
import { type StudyInput, studyInput } from '#shared/schemas/study.ts'
import { UNBLINDED_STAMP } from '#shared/terms/cautions.ts'
import { meQuery } from '../api/me.ts'
import { AnalytesSection } from '../features/analytes/AnalytesSection.tsx'
import type { AnalyteOption } from '../features/protocol/analyteOption.ts'
import { BiomarkersSection, BLANK_BIOMARKER } from '../features/protocol/BiomarkersSection.tsx'
import { ConditionSection } from '../features/protocol/ConditionSection.tsx'
import { LimitsSection } from '../features/protocol/LimitsSection.tsx'
import { SamplingSection } from '../features/protocol/SamplingSection.tsx'
import { StatusSection } from '../features/protocol/StatusSection.tsx'
import { BLANK_SITE, SitesSection } from '../features/sites/SitesSection.tsx'
import { StudySection } from '../features/studies/StudySection.tsx'
import { useCreateStudy } from '../features/studies/studies.api.ts'
import { Form } from '../forms/Form.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { Notice } from '../ui/Notice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** Sets up a study of earlier data in one go. */
export default function NewStudyPage() {
  const me = useQuery(meQuery)
  const allowed = permitsInstallation('study.create', me.data?.person.roles ?? [])
  return (
    <>
      <PageHead
        title="Set up a study of earlier data"
        sub="For rows from a file that hold sensor and reference values together"
        back={{ to: '/', label: 'All studies' }}
      />
      {allowed ? (
        <NewStudy />
      ) : (
        <Sheet>
          <EmptyPlace
            title="Setting up a study is for coordinators"
            action={<ButtonLink to="/">Go to your studies</ButtonLink>}
          >
            Your hospital account does not name you as one.
          </EmptyPlace>
        </Sheet>
      )}
    </>
  )
}

function NewStudy() {
  const navigate = useNavigate()
  const create = useCreateStudy()
  const [defaults] = useState(blankStudy)
  return (
    <Sheet
      label="About setting up a study"
      margin={
        <>
          <Notice tone="warn" title="Unblinded">
            {UNBLINDED_STAMP} This is stamped on every screen, file and page.
          </Notice>
          <p>
            What you enter here becomes version 1 of the protocol. Later changes are new versions
            with a reason; the old ones stay.
          </p>
          <p>You become the study lead and add the team afterwards.</p>
          <p>Write no names of patients, dates of birth or hospital numbers.</p>
        </>
      }
    >
      <Form
        schema={studyInput}
        defaultValues={defaults}
        submitLabel="Set up the study"
        busyLabel="Setting up…"
        onSubmit={(values) => create.mutateAsync(values)}
        onSaved={(study) => navigate(`/studies/${study.id}/subjects`)}
        onCancel={() => navigate('/')}
      >
        <StudySection />
        <SamplingSection />
        <ConditionSection />
        <AnalyteDependents />
        <SitesSection />
        <StatusSection />
      </Form>
    </Sheet>
  )
}

/** The analytes and what in the protocol speaks of them. */
function AnalyteDependents() {
  const { getValues, setValue } = useFormContext<StudyInput>()
  const analytes = useWatch<StudyInput, 'analytes'>({ name: 'analytes' })
  const options: AnalyteOption[] = analytes.filter((each) => each.name !== '')

  /** The first analyte of a study is nearly always its biomarker. */
  const onAdded = (key: string) => {
    const only = getValues('document.biomarkers')
    if (only.length === 1 && !only[0]?.analyteKey)
      // The choice has to stand among the options first.
      setTimeout(() => setValue('document.biomarkers.0.analyteKey', key))
  }
  const onRemoved = (key: string) => {
    for (const list of ['biomarkers', 'acceptanceLimits'] as const)
      getValues(`document.${list}`).forEach((each, index) => {
        if (each.analyteKey === key) setValue(`document.${list}.${index}.analyteKey`, '')
      })
  }
  return (
    <>
      <AnalytesSection onAdded={onAdded} onRemoved={onRemoved} />
      <BiomarkersSection analytes={options} />
      <LimitsSection analytes={options} />
    </>
  )
}

const blankStudy = () => ({
  id: crypto.randomUUID(),
  kind: 'earlierData' as const,
  code: '',
  title: '',
  sites: [BLANK_SITE],
  analytes: [],
  document: {
    targetCondition: '',
    referenceStandard: '',
    sampling: undefined,
    regulatoryStatus: 'researchUse' as const,
    plannedSubjects: null,
    primaryAnalyteKey: '',
    biomarkers: [BLANK_BIOMARKER],
    acceptanceLimits: [],
  },
})
