import { ticks as evenTicks, extent } from 'd3-array'
import { scaleLinear, scaleLog } from 'd3-scale'

/** An axis of measured values; the strip of values and the cut-off slider share one. */
export interface ValueAxis {
  kind: 'log' | 'linear'
  minimum: number
  maximum: number
  /** 0 at the left end, 1 at the right; beyond the ends it stays there. */
  fractionOf(value: number): number
  /** The value at a fraction of the way from left to right. */
  valueAt(fraction: number): number
  /** About as many round values as asked for, rising. */
  ticks(about: number): number[]
}

/** Air at either end, as a share of the axis. */
const AIR = 0.03

/**
 * An axis with room for all the given values, in one unit.
 * @param values finite values; with none the axis runs from 0 to 1
 * @param kind logarithmic unless asked otherwise; linear in any case where a value is nought or less
 * @throws RangeError when a value is not finite
 */
export function valueAxis(values: readonly number[], kind: ValueAxis['kind'] = 'log'): ValueAxis {
  if (!values.every(Number.isFinite)) throw new RangeError('An axis needs finite values')
  const [lowest = 0, highest = 1] = extent(values)
  return kind === 'log' && lowest > 0 ? logAxis(lowest, highest) : linearAxis(lowest, highest)
}

function logAxis(lowest: number, highest: number): ValueAxis {
  const air = highest > lowest ? (highest / lowest) ** AIR : 2
  const domain: [number, number] = [lowest / air, highest * air]
  const scale = scaleLog(domain, [0, 1]).clamp(true)
  return {
    kind: 'log',
    minimum: domain[0],
    maximum: domain[1],
    fractionOf: (value) => (value > 0 ? scale(value) : 0),
    valueAt: (fraction) => scale.invert(fraction),
    ticks: (about) => logTicks(domain, about),
  }
}

function linearAxis(lowest: number, highest: number): ValueAxis {
  const air = highest > lowest ? (highest - lowest) * AIR : Math.max(1, Math.abs(lowest))
  const domain: [number, number] = [lowest - air, highest + air]
  const scale = scaleLinear(domain, [0, 1]).clamp(true)
  return {
    kind: 'linear',
    minimum: domain[0],
    maximum: domain[1],
    fractionOf: (value) => scale(value),
    valueAt: (fraction) => scale.invert(fraction),
    ticks: (about) => evenTicks(...domain, about),
  }
}

/** 1, 2, 5 times the powers of ten; powers alone where those are too many; even steps where too few. */
function logTicks([minimum, maximum]: [number, number], about: number): number[] {
  const inDomain = (value: number) => value >= minimum && value <= maximum
  const powers: number[] = []
  for (let e = Math.floor(Math.log10(minimum)); e <= Math.ceil(Math.log10(maximum)); e += 1) {
    powers.push(Number(`1e${e}`))
  }
  const stepped = powers.flatMap((power) => [power, 2 * power, 5 * power]).filter(inDomain)
  if (stepped.length < 3) return evenTicks(minimum, maximum, about)
  if (stepped.length <= about + 2) return stepped
  return powers.filter(inDomain)
}
