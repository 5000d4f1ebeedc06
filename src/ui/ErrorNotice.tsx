import { Button } from './Button.tsx'
import { Notice } from './Notice.tsx'

type ErrorNoticeProps = {
  /** What did not work, as a sentence without a full stop. */
  what: string
  error: unknown
  onRetry?: () => unknown
}

export function ErrorNotice({ what, error, onRetry }: ErrorNoticeProps) {
  const requestId = requestIdOf(error)
  return (
    <Notice tone="stop" title={what} announce>
      <p>{error instanceof Error ? error.message : 'Something went wrong.'}</p>
      {requestId !== undefined && (
        <p className="mt-1">
          When you report this, give the number <code className="font-mono">{requestId}</code>.
        </p>
      )}
      {onRetry && (
        <Button kind="quiet" size="small" className="mt-2" onClick={() => void onRetry()}>
          Try again
        </Button>
      )}
    </Notice>
  )
}

/** A refusal explains itself; only a fault is for somebody else to look up. */
function requestIdOf(error: unknown): string | undefined {
  if (!(error instanceof Error) || !('requestId' in error)) return undefined
  if ('status' in error && Number(error.status) < 500) return undefined
  return typeof error.requestId === 'string' ? error.requestId : undefined
}
