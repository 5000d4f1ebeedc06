import { Button } from './Button.tsx'
import { Notice } from './Notice.tsx'
import { Progress } from './Progress.tsx'
import type { Beside } from './useBeside.ts'

type BesideProgressProps = { label: string; work: Exclude<Beside<unknown>, { state: 'done' }> }

/** How far the work beside the page is, with the way to stop it, and to begin again once stopped. */
export function BesideProgress({ label, work }: BesideProgressProps) {
  if (work.state === 'working')
    return <Progress label={label} fraction={work.share} onCancel={work.cancel} />
  return (
    <Notice title="Not computed">
      <p className="mb-2">{work.why} Nothing was changed.</p>
      <Button kind="quiet" size="small" onClick={work.again}>
        Compute again
      </Button>
    </Notice>
  )
}
