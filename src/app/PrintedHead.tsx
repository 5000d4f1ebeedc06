import { useEffect, useState } from 'react'
import { flushSync } from 'react-dom'
import { formatInstant } from '#shared/terms/numbers.ts'

type PrintedHeadProps = { study?: { code: string; title: string }; reader: string | undefined }

/** Head of every printed page of the browser: which study, printed by whom and when. */
export function PrintedHead({ study, reader }: PrintedHeadProps) {
  const [printedAt, setPrintedAt] = useState<string | null>(null)
  useEffect(() => {
    // The browser draws the paper right after this event.
    const note = () => flushSync(() => setPrintedAt(formatInstant(new Date().toISOString())))
    const forget = () => setPrintedAt(null)
    window.addEventListener('beforeprint', note)
    window.addEventListener('afterprint', forget)
    return () => {
      window.removeEventListener('beforeprint', note)
      window.removeEventListener('afterprint', forget)
    }
  }, [])
  if (printedAt === null) return null
  return (
    <div className="mb-3 hidden border-b border-rule-2 pb-1 text-sm print:flex print:justify-between print:gap-6">
      <span>
        <b>Breathmark{study && ` · ${study.code}`}</b>
        {study && ` ${study.title}`}
      </span>
      <span className="flex-none">
        Printed {printedAt}
        {reader !== undefined && ` by ${reader}`}
      </span>
    </div>
  )
}
