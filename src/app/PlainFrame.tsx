import { useQuery } from '@tanstack/react-query'
import { Outlet } from 'react-router-dom'
import { meQuery } from '../api/me.ts'
import { Band } from './Band.tsx'
import { Frame } from './Frame.tsx'

/** Around pages that belong to no study. */
export function PlainFrame() {
  const me = useQuery(meQuery)
  return (
    <Frame band={<Band roles={me.data?.person.roles ?? []} />}>
      <Outlet />
    </Frame>
  )
}
