import type { ReactNode } from 'react'
import type { z } from 'zod'
import type { caution } from '#shared/schemas/common.ts'
import { LOCK_KIND_LABELS, type LockKind } from '#shared/terms/lockState.ts'
import { formatDate } from '#shared/terms/numbers.ts'
import { Caution } from '../../ui/Caution.tsx'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { Facts } from '../../ui/Facts.tsx'

type StandingFactsProps = {
  caution: z.infer<typeof caution>
  dataset: { lockKind: LockKind; frozenAt: string; hash: string }
  counted?: ReactNode
  reference?: string
  /** How the interval was made: "DeLong, 95 %". */
  interval?: string
  /** Who ran it and when, or that nothing is stored. */
  run?: ReactNode
  more?: readonly { term: string; value: ReactNode }[]
}

/** The margin of everything that shows a result: caution, dataset, who is counted, method, who and when. */
export function StandingFacts(props: StandingFactsProps) {
  const { caution, dataset, counted, reference, interval, run, more = [] } = props
  const optional = (term: string, value: ReactNode) =>
    value === undefined ? [] : [{ term, value }]
  return (
    <>
      <Caution title={caution.title}>{caution.text}</Caution>
      <Facts
        items={[
          {
            term: 'Dataset',
            value: (
              <>
                {LOCK_KIND_LABELS[dataset.lockKind]}, {formatDate(dataset.frozenAt)}
                <br />
                <CopyableHash value={dataset.hash} label="dataset hash" />
              </>
            ),
          },
          ...optional('Counted', counted),
          ...optional('Reference', reference),
          ...optional('Interval', interval),
          ...optional('Run', run),
          ...more,
        ]}
      />
    </>
  )
}
