import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { Stretch } from './forEachStretch.ts'

/** First and last sample at or above `level`, the 50 % of that breath's own maximum. */
type Found = {
  first: number
  last: number
  level: number
  maximum: number
  cutStart: boolean
  cutEnd: boolean
}

/**
 * The breaths of one stretch, in order: the one that holds its maximum and, where CO2 lay below 30 %
 * of that maximum on the way up (a small breath or a cough, then a large one), those before it.
 */
export function breathsOfStretch(
  co2: Float64Array,
  stretch: Stretch,
  settings: Pick<TraceSettings, 'edgePercent' | 'endPercent' | 'breathCo2Percent'>,
): Found[] {
  const found: Found[] = []
  let to = stretch.to
  // The latest breath first; each round looks at what lies before the one just found.
  while (to > stretch.from) {
    const peak = peakOf(co2, stretch.from, to)
    const maximum = co2[peak]!
    if (maximum <= 0 || maximum < settings.breathCo2Percent) break
    const level = (maximum * settings.edgePercent) / 100
    const low = (maximum * settings.endPercent) / 100
    let before = peak
    while (before > stretch.from && co2[before - 1]! >= low) before--
    let first = before
    while (co2[first]! < level) first++
    let last = to - 1
    while (co2[last]! < level) last--
    // A breath was seen to begin where CO2 rose through the level, or else the record began in it;
    // it was seen to end where CO2 fell through the level before the next one rose.
    const cutStart = first === stretch.from
    const cutEnd = to === stretch.to && stretch.openEnd
    const begins = !cutStart || stretch.openStart
    const ends = to === stretch.to || last + 1 < to
    if (begins && ends) found.unshift({ first, last, level, maximum, cutStart, cutEnd })
    to = before
  }
  return found
}

function peakOf(co2: Float64Array, from: number, to: number): number {
  let peak = from
  for (let i = from + 1; i < to; i++) if (co2[i]! > co2[peak]!) peak = i
  return peak
}
