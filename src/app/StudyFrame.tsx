import { useQuery } from '@tanstack/react-query'
import { Outlet, useLocation, useParams } from 'react-router-dom'
import type { Role } from '#shared/policy/people.ts'
import type { Study } from '#shared/schemas/study.ts'
import { DEMONSTRATION_STAMP, UNBLINDED_STAMP } from '#shared/terms/cautions.ts'
import { ApiError } from '../api/ApiError.ts'
import { StudyContext, studyQuery } from '../api/study.ts'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'
import { Band } from './Band.tsx'
import { Course } from './Course.tsx'
import { Frame } from './Frame.tsx'
import { NotFound } from './NotFound.tsx'
import { Stamps } from './Stamps.tsx'
import { COURSE_ENDS_AT, stationOf, stationsOf } from './stations.ts'

/** Around every page of one study: band, course, stamps. */
export function StudyFrame() {
  const { studyId = '' } = useParams()
  const { pathname } = useLocation()
  const study = useQuery(studyQuery(studyId))

  if (!study.data) {
    return (
      <Frame band={<Band roles={[]} />}>
        {study.error instanceof ApiError && study.error.status === 404 ? (
          <NotFound />
        ) : study.error ? (
          <>
            <PageHead title="Study" />
            <ErrorNotice
              what="The study could not be read"
              error={study.error}
              onRetry={() => study.refetch()}
            />
          </>
        ) : (
          <SheetSkeleton />
        )}
      </Frame>
    )
  }
  const part = pathname.split('/')[3]
  return (
    <Frame
      band={
        <Band study={{ ...study.data, to: `/studies/${studyId}` }} roles={rolesIn(study.data)} />
      }
      course={
        <Course
          stations={stationsOf(study.data)}
          current={stationOf(part)}
          endsAt={COURSE_ENDS_AT}
        />
      }
      stamps={<Stamps texts={stampsOf(study.data)} />}
    >
      <StudyContext value={study.data}>
        <Outlet />
      </StudyContext>
    </Frame>
  )
}

function stampsOf(study: Study): string[] {
  const stamps: string[] = []
  if (study.kind === 'earlierData') stamps.push(UNBLINDED_STAMP)
  if (study.demonstration) stamps.push(DEMONSTRATION_STAMP)
  return stamps
}

function rolesIn(study: Study): Role[] {
  return [...new Set(study.viewer.map((line) => line.role))]
}
