import type { ReactNode } from 'react'

type DisclosureProps = {
  summary: ReactNode
  children: ReactNode
  startsOpen?: boolean
  /** Told when it opens and closes, for content that is dear to make. */
  onToggle?: (open: boolean) => void
}

/** The browser's own details element: works by keyboard and opens for a search in the page. */
export function Disclosure({ summary, children, startsOpen = false, onToggle }: DisclosureProps) {
  return (
    <details
      open={startsOpen}
      onToggle={(event) => onToggle?.(event.currentTarget.open)}
      className="group border-y border-rule py-0.5 [&+&]:border-t-0"
    >
      <summary className="flex min-h-10 list-none items-center gap-2.5 font-semibold text-spruce [&::-webkit-details-marker]:hidden">
        <svg
          aria-hidden="true"
          viewBox="0 0 10 10"
          className="size-2.5 flex-none group-open:rotate-90"
        >
          <path d="M3 1l4 4-4 4" fill="none" stroke="currentColor" strokeWidth="1.8" />
        </svg>
        {summary}
      </summary>
      <div className="pt-1 pb-3 pl-5">{children}</div>
    </details>
  )
}
