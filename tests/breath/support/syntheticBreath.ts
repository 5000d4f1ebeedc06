import { csvOf } from './csvOf.ts'

/**
 * One exhalation from 2 s on, in closed form. s = t − 2:
 * CO2 = 0.04 + co2Rise·(1 − e^(−s/co2Tau)); gas = room + rise·(1 − e^(−s/tau)) + drift·s; flow constant.
 * Outside: CO2 0.04 %, gas at room air, no flow. Samples stand on the grid i/hz.
 */
export type Breath = {
  hz: number
  /** Seconds out, and of room air after it. Both multiples of 1/hz. */
  durationS: number
  afterS: number
  co2Rise: number
  co2TauS: number
  gas: string
  roomAir: number
  rise: number
  tauS: number
  drift: number
  flowMlS: number
}

export const aBreath: Breath = {
  hz: 10,
  durationS: 10,
  afterS: 2,
  co2Rise: 5,
  co2TauS: 0.5,
  gas: 'isoprene',
  roomAir: 20,
  rise: 480,
  tauS: 1.5,
  drift: 0,
  flowMlS: 50,
}

const START_S = 2
const CO2_BASE = 0.04

export type Row = { t: number; co2: number; flow: number; gas: number }

/** The breath's samples; `t` is the sample's instant, `at` shifts what the gas channel shows. */
export function rowsOf(breath: Breath, gasDelayS = 0): Row[] {
  const count = Math.round((START_S + breath.durationS + breath.afterS) * breath.hz) + 1
  return Array.from({ length: count }, (_, i) => {
    const t = i / breath.hz
    const isOut =
      i >= START_S * breath.hz && i < Math.round((START_S + breath.durationS) * breath.hz)
    return {
      t,
      co2: isOut ? co2At(breath, t - START_S) : CO2_BASE,
      flow: isOut ? breath.flowMlS : 0,
      gas: gasAt(breath, t - gasDelayS),
    }
  })
}

export function co2At({ co2Rise, co2TauS }: Breath, s: number): number {
  return CO2_BASE + co2Rise * (1 - Math.exp(-s / co2TauS))
}

/** The gas at an instant of the trace; a rounding error before the start is not yet the breath. */
export function gasAt({ roomAir, rise, tauS, drift, durationS }: Breath, t: number): number {
  const s = t - START_S
  const isOut = s > -1e-9 && s < durationS - 1e-9
  return isOut ? roomAir + rise * (1 - Math.exp(-s / tauS)) + drift * s : roomAir
}

export const HEADER = (gas: string) => ['time_s', 'co2_percent', 'flow_ml_s', `${gas}_ppb`]

/** The breath as a file; `comments` are whole lines that stand before the header. */
export function csvOfBreath(breath: Breath, rows = rowsOf(breath), comments = ''): string {
  return (
    comments +
    csvOf(
      HEADER(breath.gas),
      rows.map(({ t, co2, flow, gas }) => [t, co2, flow, gas]),
    )
  )
}

/** Where CO2 crosses half of its maximum, by the formula and a straight line between two samples. */
export function crossingsOf(breath: Breath): { startS: number; endS: number; maximum: number } {
  const step = 1 / breath.hz
  const maximum = co2At(breath, breath.durationS - step)
  const half = maximum / 2
  const reached = -breath.co2TauS * Math.log(1 - (half - CO2_BASE) / breath.co2Rise)
  const before = Math.ceil(reached / step) - 1
  const low = before < 0 ? CO2_BASE : co2At(breath, before * step)
  const high = co2At(breath, (before + 1) * step)
  const lastS = START_S + breath.durationS - step
  return {
    startS: START_S + step * (before + (half - low) / (high - low)),
    endS: lastS + (step * (maximum - half)) / (maximum - CO2_BASE),
    maximum,
  }
}
