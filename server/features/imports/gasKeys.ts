import { GAS_CATALOGUE } from '#shared/terms/gases.ts'

const CATALOGUE = new Set(GAS_CATALOGUE.map((gas) => gas.key))
/** Units of an amount in air; what carries one is a gas whatever it is called. */
const GAS_UNITS = new Set(['[ppb]', '[ppm]', '[pptr]', 'ug/m3', 'mg/m3'])

/** The analytes of a study that are gases: their values cannot lie below 0. */
export const gasKeysOf = (analytes: readonly { key: string; unit: string }[]): Set<string> =>
  new Set(
    analytes
      .filter(({ key, unit }) => CATALOGUE.has(key) || GAS_UNITS.has(unit))
      .map(({ key }) => key),
  )
