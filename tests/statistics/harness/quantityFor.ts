import { agreementQuantities } from './agreementQuantities.ts'
import { areaQuantities } from './areaQuantities.ts'
import { countQuantities } from './countQuantities.ts'
import { cutOffQuantities } from './cutOffQuantities.ts'
import { modelQuantities } from './modelQuantities.ts'
import { planningQuantities } from './planningQuantities.ts'
import { proportionQuantities } from './proportionQuantities.ts'
import type { Quantities, Quantity } from './Quantity.ts'
import { regressionQuantities } from './regressionQuantities.ts'
import { replicateQuantities } from './replicateQuantities.ts'
import { sensorQuantities } from './sensorQuantities.ts'

const QUANTITIES: Quantities = {
  ...countQuantities,
  ...areaQuantities,
  ...cutOffQuantities,
  ...agreementQuantities,
  ...replicateQuantities,
  ...regressionQuantities,
  ...sensorQuantities,
  ...modelQuantities,
  ...planningQuantities,
  ...proportionQuantities,
}

/** The way to ask the product for a quantity: by its full name, else by the longest family. */
export function quantityFor(name: string): Quantity | undefined {
  if (Object.hasOwn(QUANTITIES, name)) return QUANTITIES[name]
  const family = Object.keys(QUANTITIES)
    .filter((key) => key.endsWith('*') && name.startsWith(key.slice(0, -1)))
    .sort((a, b) => b.length - a.length)[0]
  return family === undefined ? undefined : QUANTITIES[family]
}
