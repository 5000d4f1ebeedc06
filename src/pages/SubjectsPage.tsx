import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { Site } from '#shared/schemas/site.ts'
import type { Study } from '#shared/schemas/study.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { may, useStudy } from '../api/study.ts'
import { sitesQuery } from '../features/sites/sites.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { SUBJECT_FILTERS, SubjectFilters } from '../features/subjects/SubjectFilters.tsx'
import { SubjectsMargin } from '../features/subjects/SubjectsMargin.tsx'
import { subjectColumns } from '../features/subjects/subjectColumns.tsx'
import { subjectsQuery } from '../features/subjects/subjects.api.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { useTableParams } from '../ui/useTableParams.ts'

/** Who takes part, under codes alone. */
export default function SubjectsPage() {
  const study = useStudy()
  const sites = useQuery(sitesQuery(study.id))
  const mayList = useMay('subject.list')
  const mayImport = useMay('import.upload')
  const seen = sitesSeen(study, sites.data ?? [])
  const mayEnrol = seen.some((site) => may(study, 'subject.enrol', { siteId: site.id }))
  const empty = study.counts.subjects === 0
  return (
    <>
      <PageHead
        title="Subjects"
        sub={sites.data && headline(study, seen)}
        actions={
          <>
            {mayImport && (
              <ButtonLink kind={empty ? 'primary' : 'quiet'} to="../imports">
                Bring in a file
              </ButtonLink>
            )}
            {mayEnrol && (
              <ButtonLink kind={mayImport ? 'quiet' : 'primary'} to="enrol">
                Enrol a subject
              </ButtonLink>
            )}
          </>
        }
      />
      {mayList ? (
        <SubjectsList sites={seen} importTo={mayImport ? '../imports' : null} />
      ) : (
        <Sheet>
          <EmptyPlace title="Single subjects are not open to your role in this study">
            Analysts work on locked data. The study holds {formatCount(study.counts.subjects)}{' '}
            {study.counts.subjects === 1 ? 'subject' : 'subjects'}.
          </EmptyPlace>
        </Sheet>
      )}
    </>
  )
}

type SubjectsListProps = { sites: readonly Site[]; importTo: string | null }

function SubjectsList({ sites, importTo }: SubjectsListProps) {
  const study = useStudy()
  const params = useTableParams({ filters: SUBJECT_FILTERS })
  const subjects = useQuery(subjectsQuery(study.id, params.request))
  const columns = useMemo(() => subjectColumns(study.kind), [study.kind])
  return (
    <Sheet
      label="What is to do"
      margin={<SubjectsMargin studyId={study.id} sites={sites} importTo={importTo} />}
    >
      <DataTable
        caption="Subjects"
        hideCaption
        columns={columns}
        rows={subjects.data?.items}
        rowId={(subject) => subject.id}
        params={params}
        order="server"
        page={subjects.data}
        status={subjects}
        filters={
          study.counts.subjects > 0 ? <SubjectFilters params={params} sites={sites} /> : undefined
        }
        empty={
          <EmptyPlace
            title="No subjects yet"
            action={importTo && <ButtonLink to={importTo}>Bring in a file</ButtonLink>}
          >
            {importTo
              ? 'Bring in the file with the study’s earlier data: you name its columns, see what becomes of every row, and enter them all in one go.'
              : 'Nothing has been entered at the sites that you see.'}
          </EmptyPlace>
        }
      />
    </Sheet>
  )
}

/** Somebody at a site sees its subjects alone. */
function sitesSeen(study: Study, sites: readonly Site[]): Site[] {
  const everywhere = study.viewer.some((line) => line.siteId === null)
  return sites.filter((site) => everywhere || study.viewer.some((line) => line.siteId === site.id))
}

/** "North ward, 86 enrolled of 96 planned" */
function headline(study: Study, sites: readonly Site[]): string {
  const one = sites.length === 1 ? sites[0]! : null
  const verb = study.kind === 'earlierData' ? 'entered' : 'enrolled'
  const count = one ? one.subjectCount : study.counts.subjects
  const planned = one ? one.plannedSubjects : study.counts.plannedSubjects
  const where = one ? one.name : `${formatCount(sites.length)} sites`
  return `${where}, ${formatCount(count)} ${verb}${planned === null ? '' : ` of ${formatCount(planned)} planned`}`
}
