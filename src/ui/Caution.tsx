import type { ReactNode } from 'react'

/** What somebody has to know so that a result hurts nobody. Stays on paper. */
export function Caution({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div
      role="note"
      className="caution rounded-[3px] border border-copper bg-copper-2 px-2.5 py-2 text-[12.5px] leading-[1.4] text-copper-ink"
    >
      <strong className="block font-bold">{title}</strong>
      {children}
    </div>
  )
}
