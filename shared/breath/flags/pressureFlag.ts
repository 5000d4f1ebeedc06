import { stepsTo } from '../breaths/stepsTo.ts'
import type { Flag } from '../TraceResult.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'

/**
 * PRESS: rejects where mouth pressure stays outside its band (which keeps the soft palate closed) for
 * too long without a break. Not judged without pressure.
 */
export function pressureFlag({ trace, breath }: JudgedExhalation): Flag | null {
  const { columns, clock, settings } = trace
  const { pressureCmH2o } = columns
  if (!pressureCmH2o) return null
  const stepS = stepsTo(columns.timeS, clock, settings.gapS)
  let outside = 0
  let longest = 0
  for (let i = breath.first; i <= breath.last; i++) {
    const pressure = pressureCmH2o[i]!
    const isInside =
      pressure >= settings.lowestPressureCmH2o && pressure <= settings.highestPressureCmH2o
    outside = isInside ? 0 : outside + stepS(i)
    longest = Math.max(longest, outside)
  }
  if (clock.ticks(longest) <= clock.ticks(settings.pressureOutsideS)) return null
  return {
    name: 'PRESS',
    cause: 'pressure-outside',
    severity: 'reject',
    analyte: null,
    value: longest,
    limit: settings.pressureOutsideS,
    unit: 's',
  }
}
