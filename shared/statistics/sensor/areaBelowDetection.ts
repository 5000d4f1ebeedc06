import { gaussLegendre } from '../distributions/gaussLegendre.ts'
import { normalCdf } from '../distributions/normalCdf.ts'
import { StatisticsError } from '../StatisticsError.ts'

export type AreaBelowDetection = {
  /** Values below the limit of detection kept as ties: what to do. */
  tied: number
  /** The same rows dropped: biased downwards, shown so that nobody does it. */
  dropped: number
  shareCensoredPresent: number
  shareCensoredAbsent: number
}

/**
 * The expected area where values below a limit of detection cannot be told apart, for normal values with
 * larger values in the condition; by numerical integration over the absent above the limit.
 * @param classes means and SDs (above 0) of the classes and the limit, in one unit
 * @throws StatisticsError 'out-of-range'
 * Source: Perkins, Schisterman & Vexler 2007, Am J Epidemiol 165:325; Mumford et al 2006, Biostatistics 7:585.
 */
export function areaBelowDetection(classes: {
  meanPresent: number
  meanAbsent: number
  sdPresent: number
  sdAbsent: number
  limit: number
}): AreaBelowDetection {
  const { meanPresent, meanAbsent, sdPresent, sdAbsent, limit } = classes
  if (!(sdPresent > 0 && sdAbsent > 0)) {
    throw new StatisticsError('out-of-range', 'SDs lie above 0.')
  }
  const present = normalCdf((limit - meanPresent) / sdPresent)
  const absent = normalCdf((limit - meanAbsent) / sdAbsent)
  let bothAbove = 0
  const panels = 40
  const from = Math.max((limit - meanAbsent) / sdAbsent, -10)
  const width = Math.max(0, 10 - from) / panels
  for (let k = 0; k < panels; k++) {
    for (const { node, weight } of gaussLegendre(16)) {
      const z = from + width * (k + (node + 1) / 2)
      const density = Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI)
      const above = normalCdf((meanPresent - meanAbsent - sdAbsent * z) / sdPresent)
      bothAbove += (width / 2) * weight * density * above
    }
  }
  return {
    tied: bothAbove + (1 - present) * absent + (present * absent) / 2,
    dropped: bothAbove / ((1 - present) * (1 - absent)),
    shareCensoredPresent: present,
    shareCensoredAbsent: absent,
  }
}
