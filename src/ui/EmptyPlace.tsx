import type { ReactNode } from 'react'

type EmptyPlaceProps = {
  title: string
  /** What to do next. */
  children?: ReactNode
  action?: ReactNode
}

export function EmptyPlace({ title, children, action }: EmptyPlaceProps) {
  return (
    <div className="flex flex-col items-start gap-1 border-l-2 border-rule py-6 pl-5">
      <p className="text-lg font-semibold">{title}</p>
      {children !== undefined && <div className="max-w-[60ch] text-ink-2">{children}</div>}
      {action !== undefined && <div className="mt-3 flex flex-wrap gap-2.5">{action}</div>}
    </div>
  )
}
