import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { TraceColumns } from '../TraceColumns.ts'
import { TraceError } from '../TraceError.ts'
import type { Clock } from './Clock.ts'
import { clockOf } from './clockOf.ts'

/**
 * The clock of a trace whose numbers can be those of breath.
 * @param scratch as long as the columns, overwritten
 * @throws TraceError for fewer than two samples, a median step above `slowestIntervalS`, or a CO2
 * maximum below `smallestCo2MaximumPercent`
 */
export function requirePlausible(
  columns: TraceColumns,
  scratch: Float64Array,
  settings: TraceSettings,
): Clock {
  const { timeS, co2Percent, firstLine, headerLine, timeColumn, co2Column } = columns
  if (timeS.length === 0) {
    throw new TraceError(headerLine, 1, 'There are no numbers after the header.')
  }
  if (timeS.length === 1) {
    throw new TraceError(firstLine, 1, 'A single sample is no trace.')
  }
  const clock = clockOf(timeS, scratch)
  if (clock.intervalS > settings.slowestIntervalS) {
    throw new TraceError(
      firstLine + 1,
      timeColumn,
      `The median step in time is longer than ${settings.slowestIntervalS} s; at least ten samples a second are needed.`,
    )
  }
  let maximum = co2Percent[0]!
  let at = 0
  for (let i = 1; i < co2Percent.length; i++) {
    if (co2Percent[i]! > maximum) {
      maximum = co2Percent[i]!
      at = i
    }
  }
  if (maximum < settings.smallestCo2MaximumPercent) {
    throw new TraceError(
      firstLine + at,
      co2Column,
      `CO2 never reaches ${settings.smallestCo2MaximumPercent} %; is it given as a fraction?`,
    )
  }
  return clock
}
