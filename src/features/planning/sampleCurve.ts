import { StatisticsError } from '#shared/statistics/StatisticsError.ts'

/** Points of a curve between two ends, both taken in; where the statistics refuse, there is none. */
export function sampleCurve(
  from: number,
  to: number,
  value: (x: number) => number,
  steps = 48,
): { x: number; y: number | null }[] {
  return Array.from({ length: steps + 1 }, (_, at) => {
    const x = from + ((to - from) * at) / steps
    return { x, y: orNone(() => value(x)) }
  })
}

function orNone(value: () => number): number | null {
  try {
    const found = value()
    return Number.isFinite(found) ? found : null
  } catch (error) {
    if (error instanceof StatisticsError) return null
    throw error
  }
}
