import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { unitLabel } from '#shared/terms/gases.ts'
import { withUnit } from '#shared/terms/resultText.ts'

type Analyte = { key: string; name: string; unit: string }

/**
 * Refuses to set two different measurands against each other.
 * @throws StatisticsError different-units
 */
export function requireSameMeasurand(sensor: Analyte, reference: Analyte): void {
  if (sensor.key === reference.key) return
  throw new StatisticsError(
    'different-units',
    `The sensor’s ${described(sensor)} and the reference analyser’s ${described(reference)} are different measurands, so a difference between them means nothing and there are no limits of agreement.`,
  )
}

const described = ({ name, unit }: Analyte): string => {
  const label = unitLabel(unit)
  return label ? `${name} (${withUnit('in', label)})` : name
}
