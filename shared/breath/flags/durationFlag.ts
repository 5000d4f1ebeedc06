import type { Flag } from '../TraceResult.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'

/** DUR: rejects an exhalation that is too short for the subject's age; warns adults below 8 s. */
export function durationFlag({ trace, exhalation }: JudgedExhalation): Flag | null {
  const { clock, settings } = trace
  const { durationS } = exhalation
  const isChild = settings.subject === 'child'
  const shortest = isChild ? settings.shortestChildS : settings.shortestS
  const isTooShort = clock.ticks(durationS) < clock.ticks(shortest)
  const isShort = !isChild && clock.ticks(durationS) < clock.ticks(settings.shortS)
  if (!isTooShort && !isShort) return null
  return {
    name: 'DUR',
    cause: isTooShort ? 'too-short' : 'short',
    severity: isTooShort ? 'reject' : 'warn',
    analyte: null,
    value: durationS,
    limit: isTooShort ? shortest : settings.shortS,
    unit: 's',
  }
}
