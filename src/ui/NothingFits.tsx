import { Button } from './Button.tsx'
import { EmptyPlace } from './EmptyPlace.tsx'
import type { TableParams } from './useTableParams.ts'

/** There are rows, but not with these filters or not on this page. */
export function NothingFits({ params }: { params: TableParams }) {
  return (
    <EmptyPlace
      title="No row fits"
      action={
        <Button kind="quiet" onClick={params.clearFilters}>
          Show all rows
        </Button>
      }
    >
      Nothing here fits the filters above.
    </EmptyPlace>
  )
}
