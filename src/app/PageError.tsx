import { useEffect } from 'react'
import { useRouteError } from 'react-router-dom'
import { ApiError } from '../api/ApiError.ts'
import { Button } from '../ui/Button.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { NotFound } from './NotFound.tsx'

/** Stands in for a page that failed; band and course around it stay usable. */
export function PageError() {
  const error = useRouteError()
  useEffect(() => {
    console.error(error)
  }, [error])
  if (error instanceof ApiError && error.status === 404) return <NotFound />
  return (
    <>
      <PageHead title="This page failed" />
      <Sheet>
        <EmptyPlace
          title="Something went wrong while this page was shown"
          action={
            <>
              <Button onClick={() => window.location.reload()}>Load the page again</Button>
              <ButtonLink kind="quiet" to="/">
                Go to your studies
              </ButtonLink>
            </>
          }
        >
          <p>What was saved before is safe. What stood on this page unsaved may be lost.</p>
          {error instanceof ApiError && <p className="mt-1">{error.message}</p>}
        </EmptyPlace>
      </Sheet>
    </>
  )
}
