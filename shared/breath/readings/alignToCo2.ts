import type { Clock } from '../breaths/Clock.ts'

/**
 * A gas as it was when CO2 was: at each instant t the gas recorded at t + delay, between two samples
 * interpolated linearly. NaN where the record does not reach so far, or where t + delay falls into a
 * gap. Without a delay the recorded array itself.
 * @param timeS strictly increasing instants; `values` has the same length
 * @param delayS positive where the gas arrives after CO2
 */
export function alignToCo2(
  timeS: Float64Array,
  values: Float64Array,
  clock: Clock,
  delayS: number,
  gapS: number,
): Float64Array {
  const delay = clock.ticks(delayS)
  if (delay === 0) return values
  const gap = clock.ticks(gapS)
  const aligned = new Float64Array(values.length)
  const last = values.length - 1
  let j = 0
  let here = clock.ticks(timeS[0]!)
  for (let i = 0; i <= last; i++) {
    const wanted = clock.ticks(timeS[i]!) + delay
    while (j < last) {
      const next = clock.ticks(timeS[j + 1]!)
      if (next > wanted) break
      here = next
      j++
    }
    if (here === wanted) aligned[i] = values[j]!
    else if (here > wanted || j === last) aligned[i] = Number.NaN
    else {
      const step = clock.ticks(timeS[j + 1]!) - here
      const share = (wanted - here) / step
      aligned[i] = step > gap ? Number.NaN : values[j]! + (values[j + 1]! - values[j]!) * share
    }
  }
  return aligned
}
