import type { AnalyteInput } from '#shared/schemas/protocol.ts'
import { GAS_CATALOGUE, type Gas } from '#shared/terms/gases.ts'

/** "Marker X" → marker_x; a name without Latin letters or digits becomes "own". */
export function analyteKeyOf(name: string): string {
  const plain = name
    .normalize('NFKD')
    .toLowerCase()
    .replace(/\p{M}/gu, '')
    .replace(/[^a-z0-9]+/g, '_')
    .replace(/^_+|_+$/g, '')
    .slice(0, 36)
  return plain === '' ? 'own' : plain
}

/** A key that nothing else in the study has. */
export function freeKey(name: string, taken: readonly string[]): string {
  const key = analyteKeyOf(name)
  if (!taken.includes(key)) return key
  for (let number = 2; ; number++)
    if (!taken.includes(`${key}_${number}`)) return `${key}_${number}`
}

export const gasOf = (key: string): Gas | undefined => GAS_CATALOGUE.find((gas) => gas.key === key)

/** A gas of the catalogue as a study takes it over. */
export const fromCatalogue = ({ key, name, unit }: Gas): AnalyteInput => ({ key, name, unit })

/** "NH₃, CAS 7664-41-7, 17.031 g/mol" */
export const describeGas = (gas: Gas): string =>
  `${gas.formula}, CAS ${gas.casNumber}, ${gas.molarMassGPerMol} g/mol`

/** The gases whose name, formula or CAS number holds what was typed; subscripts count as digits. */
export function searchCatalogue(typed: string, taken: readonly string[]): Gas[] {
  const wanted = plainText(typed)
  return GAS_CATALOGUE.filter(
    (gas) =>
      !taken.includes(gas.key) &&
      [gas.name, gas.formula, gas.casNumber].some((text) => plainText(text).includes(wanted)),
  )
}

const plainText = (text: string) => text.normalize('NFKD').trim().toLowerCase()
