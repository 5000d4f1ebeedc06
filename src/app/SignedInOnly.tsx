import { useQuery } from '@tanstack/react-query'
import { Outlet } from 'react-router-dom'
import { ApiError } from '../api/ApiError.ts'
import { meQuery } from '../api/me.ts'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'
import { IdleWarning } from './IdleWarning.tsx'
import { Landing } from './Landing.tsx'
import { SignInAgain } from './SignInAgain.tsx'
import { SomebodyElse } from './SomebodyElse.tsx'

/** Lets in who is signed in; once in, a login that ends is asked for again over the page. */
export function SignedInOnly() {
  const me = useQuery(meQuery)
  if (me.data) {
    return (
      <>
        <Outlet />
        <SignInAgain />
        <IdleWarning />
        <SomebodyElse />
      </>
    )
  }
  if (me.error instanceof ApiError && me.error.status === 401) return <Landing />
  return (
    <main className="mx-auto max-w-[1360px] p-7">
      {me.error ? (
        <>
          <PageHead title="Breathmark" />
          <ErrorNotice
            what="It could not be found out who is signed in"
            error={me.error}
            onRetry={() => me.refetch()}
          />
        </>
      ) : (
        <SheetSkeleton />
      )}
    </main>
  )
}
