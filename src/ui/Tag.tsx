import type { ReactNode } from 'react'
import { classes } from './classes.ts'

export type TagTone = 'plain' | 'good' | 'warn' | 'stop' | 'copper'

const TONES: Record<TagTone, string> = {
  plain: 'bg-spruce-2 text-spruce-ink',
  good: 'bg-good-2 text-good-ink',
  warn: 'bg-warn-2 text-warn-ink',
  stop: 'bg-stop-2 text-stop-ink',
  copper: 'bg-copper-2 text-copper-ink',
}

/** A state in words; the tone only repeats what the words say. */
export function Tag({ tone = 'plain', children }: { tone?: TagTone; children: ReactNode }) {
  return (
    <span
      className={classes(
        'inline-block rounded-[3px] px-2 py-px text-[12.5px] leading-[1.5] print:border print:border-rule-2',
        TONES[tone],
      )}
    >
      {children}
    </span>
  )
}
