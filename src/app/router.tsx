import type { ComponentType } from 'react'
import { createBrowserRouter, Navigate, type RouteObject } from 'react-router-dom'
import { NotFound } from './NotFound.tsx'
import { PageError } from './PageError.tsx'
import { PlainFrame } from './PlainFrame.tsx'
import { Root } from './Root.tsx'
import { SignedInAgain } from './SignedInAgain.tsx'
import { SignedInOnly } from './SignedInOnly.tsx'
import { StudyFrame } from './StudyFrame.tsx'
import { SIGNED_IN_PATH } from './signIn.ts'

/** Pages outside of any study. */
const PLAIN_PAGES: RouteObject[] = [
  { index: true, lazy: page(() => import('../pages/StudiesPage.tsx')) },
  { path: 'studies/new', lazy: page(() => import('../pages/NewStudyPage.tsx')) },
  { path: 'planning', lazy: page(() => import('../pages/PlanningPage.tsx')) },
  { path: 'planning/:part', lazy: page(() => import('../pages/PlanningPage.tsx')) },
  { path: 'sensor', lazy: page(() => import('../pages/SensorPage.tsx')) },
  { path: 'sensor/:part', lazy: page(() => import('../pages/SensorPage.tsx')) },
]

/** Pages of a study; the first part of the path names its station. */
const STUDY_PAGES: RouteObject[] = [
  { path: 'protocol', lazy: page(() => import('../pages/ProtocolPage.tsx')) },
  { path: 'protocol/amend', lazy: page(() => import('../pages/AmendProtocolPage.tsx')) },
  { path: 'team', lazy: page(() => import('../pages/TeamPage.tsx')) },
  { path: 'subjects', lazy: page(() => import('../pages/SubjectsPage.tsx')) },
  { path: 'subjects/enrol', lazy: page(() => import('../pages/EnrolSubjectPage.tsx')) },
  { path: 'subjects/:subjectId', lazy: page(() => import('../pages/SubjectPage.tsx')) },
  { path: 'imports', lazy: page(() => import('../pages/ImportsPage.tsx')) },
  { path: 'imports/new', lazy: page(() => import('../pages/ImportNewPage.tsx')) },
  { path: 'imports/:importId', lazy: page(() => import('../pages/ImportPage.tsx')) },
  { path: 'sessions', lazy: page(() => import('../pages/SessionsPage.tsx')) },
  { path: 'reference', lazy: page(() => import('../pages/ReferencePage.tsx')) },
  { path: 'review', lazy: page(() => import('../pages/ReviewPage.tsx')) },
  { path: 'reports', lazy: page(() => import('../pages/ReportsPage.tsx')) },
  { path: 'reports/new', lazy: page(() => import('../pages/NewReportPage.tsx')) },
  { path: 'lock', lazy: page(() => import('../pages/LockPage.tsx')) },
  { path: 'results', lazy: page(() => import('../pages/ResultsPage.tsx')) },
  { path: 'results/explore', lazy: page(() => import('../pages/ExplorePage.tsx')) },
  { path: 'results/compare', lazy: page(() => import('../pages/ComparePage.tsx')) },
  { path: 'results/panel', lazy: page(() => import('../pages/PanelPage.tsx')) },
  { path: 'results/:analysisId', lazy: page(() => import('../pages/AnalysisPage.tsx')) },
]

const routes: RouteObject[] = [
  {
    element: <Root />,
    // The router waits for the first page's code; the frame shows the shape of what comes.
    hydrateFallbackElement: <main className="p-7" />,
    errorElement: (
      <main className="p-7">
        <PageError />
      </main>
    ),
    children: [
      { path: SIGNED_IN_PATH, element: <SignedInAgain /> },
      {
        element: <SignedInOnly />,
        children: [
          {
            element: <PlainFrame />,
            children: [
              {
                errorElement: <PageError />,
                children: [...PLAIN_PAGES, { path: '*', element: <NotFound /> }],
              },
            ],
          },
          {
            path: 'studies/:studyId',
            element: <StudyFrame />,
            children: [
              {
                errorElement: <PageError />,
                children: [
                  { index: true, element: <Navigate to="protocol" replace /> },
                  ...STUDY_PAGES,
                  { path: '*', element: <NotFound /> },
                ],
              },
            ],
          },
        ],
      },
    ],
  },
]

export function createRouter() {
  return createBrowserRouter(routes)
}

/** A page is loaded when somebody goes there. Each page file has one default export. */
export function page(load: () => Promise<{ default: ComponentType }>): RouteObject['lazy'] {
  return async () => ({ Component: (await load()).default })
}
