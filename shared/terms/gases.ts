/** UCUM codes of the units that readings may carry, and how a person reads them. */
export const UNITS = {
  '[ppb]': 'ppb',
  '[ppm]': 'ppm',
  '[pptr]': 'ppt',
  'ug/m3': 'µg/m³',
  'mg/m3': 'mg/m³',
  'ug/L': 'µg/L',
  'ng/mL': 'ng/mL',
  'umol/L': 'µmol/L',
  'mmol/L': 'mmol/L',
  'L/min': 'L/min',
  mL: 'mL',
  'mm[Hg]': 'mmHg',
  kPa: 'kPa',
  '%': '%',
  '1': 'no unit',
} as const satisfies Record<string, string>
export type Unit = keyof typeof UNITS
export const UNIT_CODES = Object.keys(UNITS) as [Unit, ...Unit[]]

/** The unit as shown after a number; nothing where there is none. */
export const unitLabel = (unit: string): string =>
  unit === '1' ? '' : ((UNITS as Record<string, string>)[unit] ?? unit)

export type Gas = {
  key: string
  name: string
  formula: string
  casNumber: string
  molarMassGPerMol: number
  unit: Unit
}

const gas = (
  key: string,
  name: string,
  formula: string,
  casNumber: string,
  molarMassGPerMol: number,
  unit: Unit = '[ppb]',
): Gas => ({ key, name, formula, casNumber, molarMassGPerMol, unit })

/**
 * Breath gases with CAS registry number and molar mass (general knowledge, standard atomic weights).
 * The unit is the one in which breath levels are usually stated.
 */
export const GAS_CATALOGUE: readonly Gas[] = [
  gas('ammonia', 'Ammonia', 'NH₃', '7664-41-7', 17.031),
  gas('acetone', 'Acetone', 'C₃H₆O', '67-64-1', 58.08),
  gas('isoprene', 'Isoprene', 'C₅H₈', '78-79-5', 68.119),
  gas('nitric_oxide', 'Nitric oxide', 'NO', '10102-43-9', 30.006),
  gas('carbon_monoxide', 'Carbon monoxide', 'CO', '630-08-0', 28.01, '[ppm]'),
  gas('hydrogen', 'Hydrogen', 'H₂', '1333-74-0', 2.016, '[ppm]'),
  gas('methane', 'Methane', 'CH₄', '74-82-8', 16.043, '[ppm]'),
  gas('ethane', 'Ethane', 'C₂H₆', '74-84-0', 30.07),
  gas('pentane', 'n-Pentane', 'C₅H₁₂', '109-66-0', 72.151),
  gas('hydrogen_sulfide', 'Hydrogen sulfide', 'H₂S', '7783-06-4', 34.081),
  gas('carbonyl_sulfide', 'Carbonyl sulfide', 'COS', '463-58-1', 60.075),
  gas('hydrogen_cyanide', 'Hydrogen cyanide', 'HCN', '74-90-8', 27.026),
  gas('benzene', 'Benzene', 'C₆H₆', '71-43-2', 78.114),
  gas('1_propanol', '1-Propanol', 'C₃H₈O', '71-23-8', 60.096),
  gas('2_butanone', '2-Butanone', 'C₄H₈O', '78-93-3', 72.107),
  gas('hexanal', 'Hexanal', 'C₆H₁₂O', '66-25-1', 100.161),
  gas('2_methylpentane', '2-Methylpentane', 'C₆H₁₄', '107-83-5', 86.178),
]

type Identity = { formula?: string; casNumber?: string; molarMassGPerMol?: number }

/** What an analyte is: a gas of the catalogue keeps the catalogue's word, whatever else was said. */
export function identityOf(analyte: Identity & { key: string }) {
  const said: Identity = GAS_CATALOGUE.find((each) => each.key === analyte.key) ?? analyte
  return {
    formula: said.formula ?? null,
    casNumber: said.casNumber ?? null,
    molarMassGPerMol: said.molarMassGPerMol ?? null,
  }
}
