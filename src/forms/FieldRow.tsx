import type { ReactNode } from 'react'

/** Fields side by side where there is room; each still has its own label, hint and error. */
export function FieldRow({ children }: { children: ReactNode }) {
  return (
    <div className="grid max-w-3xl grid-cols-[repeat(auto-fit,minmax(min(100%,13rem),1fr))] items-end gap-x-6 gap-y-5">
      {children}
    </div>
  )
}
