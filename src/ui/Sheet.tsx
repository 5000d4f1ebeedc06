import type { ReactNode } from 'react'
import { classes } from './classes.ts'

type SheetProps = {
  /** Where the work on the right comes from: dataset, who, when, method, caution. */
  margin?: ReactNode
  /** Names the margin for people who move by landmarks. */
  label?: string
  children: ReactNode
}

/** A working surface; its margin stands on the left behind the copper rule and folds on top on a narrow screen. */
export function Sheet({ margin, label = 'About this page', children }: SheetProps) {
  return (
    <div
      className={classes(
        'mb-[18px] rounded-[3px] border border-rule bg-sheet print:border-0',
        margin !== undefined && 'wide:grid wide:grid-cols-[208px_minmax(0,1fr)]',
      )}
    >
      {margin !== undefined && (
        <aside
          aria-label={label}
          className="flex flex-col gap-4 border-copper bg-margin px-4 py-[18px] text-sm text-ink-2 max-wide:gap-3 max-wide:border-b wide:border-r"
        >
          {margin}
        </aside>
      )}
      <div className="min-w-0 px-[22px] py-[18px] max-wide:p-4">{children}</div>
    </div>
  )
}
