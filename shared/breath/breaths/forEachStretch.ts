import type { TraceSettings } from '../settings/TraceSettings.ts'

/**
 * Samples [from, to) between two falls below the share of a maximum that ends a breath: the rise, the
 * height and the fall of one breath, and, before the rise, its lowest value.
 */
export type Stretch = {
  from: number
  to: number
  /** The record starts (ends) inside this stretch: its beginning (end) was not seen. */
  openStart: boolean
  openEnd: boolean
}

/**
 * Cuts a CO2 trace into stretches, in order. A stretch ends at the first sample below 30 % of
 * its running maximum. The next one starts at the lowest value that follows, so that the rest of a
 * slow fall never counts towards the next breath's maximum.
 */
export function forEachStretch(
  co2: Float64Array,
  { edgePercent, endPercent }: Pick<TraceSettings, 'edgePercent' | 'endPercent'>,
  take: (stretch: Stretch) => void,
): void {
  const edgeShare = edgePercent / 100
  const endShare = endPercent / 100
  let from = 0
  let maximum = co2[0]!
  let openStart = true
  let rising = true
  for (let i = 1; i < co2.length; i++) {
    const value = co2[i]!
    if (!rising) {
      if (value <= co2[from]!) {
        from = i
        maximum = value
        continue
      }
      // From here on the stretch holds a rise through the level of its maximum.
      rising = value > 0 && value * edgeShare > co2[from]!
    }
    if (value > maximum) maximum = value
    else if (rising && value < endShare * maximum) {
      take({ from, to: i, openStart, openEnd: false })
      from = i
      maximum = value
      openStart = false
      rising = false
    }
  }
  take({ from, to: co2.length, openStart, openEnd: true })
}
