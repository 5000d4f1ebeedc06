import { Button } from './Button.tsx'
import { EmptyPlace } from './EmptyPlace.tsx'
import type { TableParams } from './useTableParams.ts'

/** The server refused what the address asks for: an order, a filter or a page that is not there. */
export function isRefusedAddress(error: Error): boolean {
  return 'status' in error && error.status === 422
}

/** Trying again would ask the same; the way on is to ask afresh. */
export function NotAskedWell({ params }: { params: TableParams }) {
  return (
    <EmptyPlace
      title="The address of this page is not understood"
      action={<Button onClick={params.reset}>Show all rows</Button>}
    >
      It asks for an order, a filter or a page that this table does not have.
    </EmptyPlace>
  )
}
