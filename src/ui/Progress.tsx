import { type ReactNode, useId } from 'react'
import { Button } from './Button.tsx'

type ProgressProps = {
  label: string
  /** 0 to 1; leave it out while nobody can tell. */
  fraction?: number
  /** How far in words, such as "7,200 of 17,978 rows". */
  detail?: ReactNode
  onCancel?: () => void
  cancelLabel?: string
}

export function Progress({
  label,
  fraction,
  detail,
  onCancel,
  cancelLabel = 'Stop',
}: ProgressProps) {
  const id = useId()
  const percent = fraction === undefined ? undefined : Math.floor(clamp(fraction) * 100)
  return (
    <div className="flex flex-wrap items-end gap-x-4 gap-y-2">
      <div className="min-w-56 flex-1">
        <div className="mb-1.5 flex justify-between gap-4">
          <span id={id} className="font-semibold">
            {label}
          </span>
          <span className="text-ink-2">{percent === undefined ? 'working …' : `${percent} %`}</span>
        </div>
        <div
          role="progressbar"
          aria-labelledby={id}
          aria-valuemin={0}
          aria-valuemax={100}
          aria-valuenow={percent}
          className="h-2 overflow-hidden rounded-full bg-spruce-2"
        >
          {percent === undefined ? (
            <div className="h-full w-1/3 animate-pulse rounded-full bg-spruce" />
          ) : (
            <div
              className="h-full rounded-full bg-spruce transition-[width] duration-300"
              style={{ width: `${percent}%` }}
            />
          )}
        </div>
        {detail !== undefined && <p className="mt-1.5 text-sm text-ink-2">{detail}</p>}
      </div>
      {onCancel && (
        <Button kind="quiet" onClick={onCancel}>
          {cancelLabel}
        </Button>
      )}
    </div>
  )
}

function clamp(fraction: number): number {
  return Math.min(1, Math.max(0, fraction))
}
