import { GAS_CATALOGUE } from '#shared/terms/gases.ts'

/** "Nitric oxide" for nitric_oxide, also for gases that the catalogue does not know. */
export function gasWords(analyte: string): string {
  const known = GAS_CATALOGUE.find(({ key }) => key === analyte)
  if (known) return known.name
  const words = analyte.replaceAll('_', ' ')
  return words.charAt(0).toUpperCase() + words.slice(1)
}
