const SMOOTHING = 2

/**
 * What a first-order sensor saw before it lagged: C = C_m + τ·dC_m/dt, with the derivative from the
 * samples on either side and a moving mean over two samples to each side.
 * @param timeS strictly increasing; `measured` has the same length
 * @param timeConstantS τ; the caller refuses more than 2 s, which would amplify noise alone
 * @returns samples [from, to)
 */
export function inverseFiltered(
  timeS: Float64Array,
  measured: Float64Array,
  timeConstantS: number,
  from: number,
  to: number,
): Float64Array {
  const last = timeS.length - 1
  const sharpened = (i: number) => {
    const before = Math.max(i - 1, 0)
    const after = Math.min(i + 1, last)
    const rise = measured[after]! - measured[before]!
    return measured[i]! + (timeConstantS * rise) / (timeS[after]! - timeS[before]!)
  }
  return Float64Array.from({ length: to - from }, (_, k) => {
    const first = Math.max(from + k - SMOOTHING, from)
    const end = Math.min(from + k + SMOOTHING + 1, to)
    let sum = 0
    for (let i = first; i < end; i++) sum += sharpened(i)
    return sum / (end - first)
  })
}
