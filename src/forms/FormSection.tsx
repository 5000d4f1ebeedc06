import type { ReactNode } from 'react'
import { Disclosure } from '../ui/Disclosure.tsx'

type FormSectionProps = {
  title: string
  /** Folded until somebody wants it. */
  optional?: boolean
  children: ReactNode
}

export function FormSection({ title, optional = false, children }: FormSectionProps) {
  if (optional) {
    return (
      <Disclosure
        summary={
          <span>
            {title} <span className="font-normal text-ink-2">(optional)</span>
          </span>
        }
      >
        <div className="flex flex-col gap-5 pt-2">{children}</div>
      </Disclosure>
    )
  }
  return (
    <section className="flex flex-col gap-5 border-t border-rule pt-5 first:border-t-0 first:pt-0">
      <h2 className="mb-0">{title}</h2>
      {children}
    </section>
  )
}
