import { type ReactNode, useEffect } from 'react'
import { Link } from 'react-router-dom'

type PageHeadProps = {
  title: string
  sub?: ReactNode
  actions?: ReactNode
  /** The page that this one belongs to. */
  back?: { to: string; label: string }
}

/** The page's one h1; names the browser's tab as well. */
export function PageHead({ title, sub, actions, back }: PageHeadProps) {
  useEffect(() => {
    document.title = `${title} · Breathmark`
  }, [title])
  return (
    <div className="mb-4 flex flex-wrap items-end gap-x-4 gap-y-3">
      <div className="min-w-0 max-wide:basis-full">
        {back && (
          <Link to={back.to} className="link mb-1 inline-block text-sm print:hidden">
            {back.label}
          </Link>
        )}
        <h1>{title}</h1>
        {sub !== undefined && <p className="text-ink-2">{sub}</p>}
      </div>
      {actions !== undefined && (
        <div className="flex flex-wrap gap-2.5 wide:ml-auto print:hidden">{actions}</div>
      )}
    </div>
  )
}
