import { csvOf } from './csvOf.ts'

/** What a trace of steps shows for some seconds; what is missing keeps its value from `AIR` or `BREATH`. */
export type Piece = {
  seconds: number
  co2?: number
  flow?: number
  pressure?: number
  gas?: number
}

export const air = (seconds: number, other: Partial<Piece> = {}): Piece => ({
  seconds,
  co2: 0.04,
  flow: 0,
  pressure: 0,
  gas: 20,
  ...other,
})
export const breath = (seconds: number, other: Partial<Piece> = {}): Piece => ({
  seconds,
  co2: 5,
  flow: 50,
  pressure: 10,
  gas: 500,
  ...other,
})

/** Options: the gas's name; which samples to leave out, by their instant; lines before the header. */
export type StepOptions = {
  gas?: string
  without?: (t: number) => boolean
  comments?: string
  temperatureC?: number
  humidityPercent?: number
}

/** A file at 10 Hz with time, CO2, flow, pressure and one gas; temperature and humidity if given. */
export function stepTrace(pieces: Piece[], options: StepOptions = {}): string {
  const { gas = 'isoprene', without = () => false, comments = '' } = options
  const climate = [options.temperatureC, options.humidityPercent].filter((x) => x !== undefined)
  const rows: number[][] = []
  let i = 0
  for (const piece of pieces) {
    const { seconds, co2 = 0, flow = 0, pressure = 0, gas: ppb = 0 } = piece
    for (let k = 0; k < Math.round(seconds * 10); k++, i++) {
      if (!without(i / 10)) rows.push([i / 10, co2, flow, pressure, ppb, ...climate])
    }
  }
  const names = ['time_s', 'co2_percent', 'flow_ml_s', 'pressure_cmh2o', `${gas}_ppb`]
  if (options.temperatureC !== undefined) names.push('temperature_c')
  if (options.humidityPercent !== undefined) names.push('humidity_percent')
  return comments + csvOf(names, rows)
}
