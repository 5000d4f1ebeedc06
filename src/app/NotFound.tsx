import { ButtonLink } from '../ui/ButtonLink.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** An address without a page, or one that the reader has no access to: both look the same. */
export function NotFound() {
  return (
    <>
      <PageHead title="Nothing here" />
      <Sheet>
        <EmptyPlace
          title="There is no such page, or you have no access to it"
          action={<ButtonLink to="/">Go to your studies</ButtonLink>}
        >
          Check the address. If a colleague sent it, ask them whether you are in the team of that
          study.
        </EmptyPlace>
      </Sheet>
    </>
  )
}
