import { Outlet, ScrollRestoration } from 'react-router-dom'
import { UnsavedWorkGuard } from '../forms/UnsavedWork.tsx'

/** Around every page. */
export function Root() {
  return (
    <UnsavedWorkGuard>
      <Outlet />
      <ScrollRestoration />
    </UnsavedWorkGuard>
  )
}
