import type { ImportState } from '#shared/terms/importState.ts'
import { classes } from '../../ui/classes.ts'

const STEPS = ['Name the columns', 'Look at the rows', 'Enter them'] as const

/** Where a file stands on its way in. */
export function ImportSteps({ state, atColumns }: { state: ImportState; atColumns: boolean }) {
  const current = stepOf(state, atColumns)
  return (
    <ol className="mb-5 flex flex-wrap gap-x-8 gap-y-1 border-b border-rule pb-3">
      {STEPS.map((step, index) => (
        <li
          key={step}
          aria-current={index === current ? 'step' : undefined}
          className={classes(
            'flex items-baseline gap-2',
            index === current ? 'font-semibold text-ink' : 'text-ink-2',
          )}
        >
          <span
            aria-hidden="true"
            className={classes(
              'inline-flex size-[22px] translate-y-px items-center justify-center rounded-full border text-xs font-semibold',
              index < current && 'border-spruce bg-spruce-2 text-spruce-ink',
              index === current && 'border-spruce bg-spruce text-on-spruce',
              index > current && 'border-rule-2',
            )}
          >
            {index + 1}
          </span>
          {step}
        </li>
      ))}
    </ol>
  )
}

function stepOf(state: ImportState, atColumns: boolean): number {
  if (state === 'entered') return STEPS.length
  if (state === 'entering') return 2
  if (state === 'uploaded' || state === 'failed' || atColumns) return 0
  return 1
}
