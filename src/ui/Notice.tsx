import type { ReactNode } from 'react'
import { classes } from './classes.ts'

export type NoticeTone = 'plain' | 'good' | 'warn' | 'stop'

const TONES: Record<NoticeTone, string> = {
  plain: 'border-rule-2 bg-margin text-ink',
  good: 'border-good bg-good-2 text-good-ink',
  warn: 'border-warn bg-warn-2 text-warn-ink',
  stop: 'border-stop bg-stop-2 text-stop-ink',
}

type NoticeProps = {
  tone?: NoticeTone
  title?: string
  children?: ReactNode
  /** Read out at once, for something that appears by itself. */
  announce?: boolean
}

export function Notice({ tone = 'plain', title, children, announce = false }: NoticeProps) {
  return (
    <div
      role={announce ? (tone === 'stop' ? 'alert' : 'status') : undefined}
      className={classes('rounded-[3px] border px-3 py-2.5 text-sm', TONES[tone])}
    >
      {title !== undefined && <p className="font-bold">{title}</p>}
      {children}
    </div>
  )
}
