import { TraceError } from '../TraceError.ts'
import { decodeText } from './decodeText.ts'
import { GAS_NAME } from './gasName.ts'

const QUANTITIES = {
  time_s: 'timeS',
  co2_percent: 'co2Percent',
  flow_ml_s: 'flowMlS',
  pressure_cmh2o: 'pressureCmH2o',
  temperature_c: 'temperatureC',
  humidity_percent: 'humidityPercent',
} as const

export type Quantity = (typeof QUANTITIES)[keyof typeof QUANTITIES]

/** A cell of the header: a quantity of the breath, or a gas and what turns its unit into ppb. */
export type HeaderCell =
  | { quantity: Quantity; gas: null; factor: 1 }
  | { quantity: null; gas: string; factor: 1 | 1000 }

/** Quantities with a unit of their own: never gases in ppb. */
const NOT_GASES = ['co2', 'carbon_dioxide', 'time', 'flow', 'pressure', 'temperature', 'humidity']
/** More than any instrument has; keeps a hostile header from filling the memory. */
const MOST_CELLS = 64

/**
 * The columns that the header in bytes[from, to) names, in its order.
 * @throws TraceError at a name that is unknown, capital, quoted, empty or there twice (a gas in ppb
 * and ppm is the same gas), and at cell 1 where time, CO2 or every gas is missing
 */
export function readHeader(
  bytes: Uint8Array,
  from: number,
  to: number,
  line: number,
): HeaderCell[] {
  const names = decodeText(bytes, from, to, line, 1).split(',')
  if (names.length > MOST_CELLS) {
    throw new TraceError(line, MOST_CELLS + 1, `There are more than ${MOST_CELLS} columns.`)
  }
  const cells: HeaderCell[] = []
  for (const [index, name] of names.entries()) {
    const cell = headerCell(name.replace(/^[ \t]+|[ \t]+$/g, ''), line, index + 1)
    if (cells.some((other) => (other.gas ?? other.quantity) === (cell.gas ?? cell.quantity))) {
      throw new TraceError(line, index + 1, 'This quantity has a column already.')
    }
    cells.push(cell)
  }
  requireColumns(cells, line)
  return cells
}

function headerCell(name: string, line: number, column: number): HeaderCell {
  if (Object.hasOwn(QUANTITIES, name)) {
    return { quantity: QUANTITIES[name as keyof typeof QUANTITIES], gas: null, factor: 1 }
  }
  const [, gas, unit] = /^(.+)_(ppb|ppm)$/.exec(name) ?? []
  if (gas && GAS_NAME.test(gas) && !NOT_GASES.includes(gas)) {
    return { quantity: null, gas, factor: unit === 'ppm' ? 1000 : 1 }
  }
  throw new TraceError(line, column, reasonOf(name))
}

function reasonOf(name: string): string {
  if (name === '') return 'The column has no name.'
  if (name.includes('"')) return 'The name is quoted; names stand without quotation marks.'
  if (name.includes(';')) return 'Columns are separated by semicolons; separate them by commas.'
  if (name.includes('\t')) return 'Columns are separated by tabs; separate them by commas.'
  if (/^co2_|^carbon_dioxide_/.test(name)) return 'CO2 is read in percent, as co2_percent.'
  if (name !== name.toLowerCase()) return 'Column names are written in small letters.'
  return `This column is not known; columns are ${Object.keys(QUANTITIES).join(', ')} and gases in ppb or ppm, such as acetone_ppb.`
}

function requireColumns(cells: HeaderCell[], line: number): void {
  const has = (quantity: Quantity) => cells.some((cell) => cell.quantity === quantity)
  if (!has('timeS')) throw new TraceError(line, 1, 'The column time_s is missing.')
  if (!has('co2Percent')) throw new TraceError(line, 1, 'The column co2_percent is missing.')
  if (!cells.some((cell) => cell.gas)) {
    throw new TraceError(line, 1, 'There is no gas: a column such as acetone_ppb is missing.')
  }
}
