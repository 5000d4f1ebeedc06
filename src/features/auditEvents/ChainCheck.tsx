import { useQuery } from '@tanstack/react-query'
import type { ChainVerdict } from '#shared/schemas/auditEvent.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { Button } from '../../ui/Button.tsx'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { ErrorNotice } from '../../ui/ErrorNotice.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { InstantText } from '../../ui/InstantText.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { Progress } from '../../ui/Progress.tsx'
import { chainHeadQuery, useVerifyChain } from './auditEvents.api.ts'

/** Number of events, head of the chain, and the check of it from its first event on. */
export function ChainCheck({ studyId }: { studyId: string }) {
  const head = useQuery(chainHeadQuery(studyId))
  const check = useVerifyChain(studyId)
  const { progress } = check
  return (
    <>
      {head.data && (
        <Facts
          items={[
            { term: 'In the trail', value: `${formatCount(head.data.count)} events` },
            {
              term: 'Head of the chain',
              value: <CopyableHash value={head.data.headHash} label="head hash" />,
            },
          ]}
        />
      )}
      {head.error && (
        <ErrorNotice
          what="The head of the chain could not be read"
          error={head.error}
          onRetry={head.refetch}
        />
      )}
      {check.isPending ? (
        <Progress
          label="Verifying"
          fraction={progress ? progress.checked / Math.max(1, progress.count) : undefined}
          detail={
            progress
              ? `${formatCount(progress.checked)} of ${formatCount(progress.count)} events`
              : 'Reading the first events'
          }
          onCancel={check.stop}
        />
      ) : (
        <div>
          <Button kind="quiet" size="small" onClick={() => check.mutate()}>
            Verify the chain
          </Button>
        </div>
      )}
      {check.data && !check.isPending && <Verdict verdict={check.data} />}
      {check.error && check.error.name !== 'AbortError' && (
        <ErrorNotice what="The chain could not be checked to its end" error={check.error} />
      )}
    </>
  )
}

function Verdict({ verdict }: { verdict: ChainVerdict }) {
  const { firstBreak, count, redacted, checkedAt } = verdict
  if (firstBreak)
    return (
      <Notice tone="stop" title="The chain is broken" announce>
        <p>{firstBreak.what}</p>
        <p>
          What lies before event {formatCount(firstBreak.position)} holds. Tell whoever runs this
          installation, and keep this page as it is.
        </p>
        <p>
          <InstantText at={checkedAt} />
        </p>
      </Notice>
    )
  return (
    <Notice tone="good" title="The chain is whole" announce>
      <p>
        {count === 1
          ? 'The one event is as it was written.'
          : `All ${formatCount(count)} events are as they were written, in their order, up to the head.`}
        {redacted > 0 && ` ${formatCount(redacted)} values were blanked by redaction.`}
      </p>
      <p>
        <InstantText at={checkedAt} />
      </p>
    </Notice>
  )
}
