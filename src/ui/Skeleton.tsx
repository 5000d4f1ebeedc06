import { classes } from './classes.ts'

const LINES = [
  { key: 'first', width: 'w-full' },
  { key: 'second', width: 'w-11/12' },
  { key: 'third', width: 'w-4/5' },
  { key: 'fourth', width: 'w-full' },
  { key: 'fifth', width: 'w-2/3' },
  { key: 'sixth', width: 'w-11/12' },
]

/** The shape of one to six lines to come. */
export function Skeleton({ lines = 3 }: { lines?: number }) {
  return (
    <div role="status" aria-label="Loading" className="flex flex-col gap-2.5">
      {LINES.slice(0, lines).map((line) => (
        <SkeletonBar key={line.key} className={line.width} />
      ))}
    </div>
  )
}

export function SkeletonBar({ className }: { className?: string }) {
  return <span className={classes('block h-3.5 animate-pulse rounded-[3px] bg-rule', className)} />
}

/** The shape of a page to come: head, margin and body. */
export function SheetSkeleton() {
  return (
    <div role="status" aria-label="Loading">
      <SkeletonBar className="mb-3 h-6 w-64" />
      <SkeletonBar className="mb-5 w-96 max-w-full" />
      <div className="rounded-[3px] border border-rule bg-sheet wide:grid wide:grid-cols-[208px_minmax(0,1fr)]">
        <div className="flex flex-col gap-3 border-copper bg-margin px-4 py-5 max-wide:border-b wide:border-r">
          <SkeletonBar className="w-1/2" />
          <SkeletonBar className="w-4/5" />
          <SkeletonBar className="w-3/5" />
        </div>
        <div className="flex min-h-72 flex-col gap-4 p-6">
          <SkeletonBar className="h-5 w-1/3" />
          <SkeletonBar />
          <SkeletonBar className="w-11/12" />
          <SkeletonBar className="w-4/5" />
          <SkeletonBar className="w-11/12" />
        </div>
      </div>
    </div>
  )
}
