import type { ValueAxis } from '#shared/figures/valueAxis.ts'

/** The slider divides the axis into so many steps. */
const STEPS = 1_000

/**
 * A place on the slider as a value that can be read and written down: rounded to the decimal place
 * that one step of the slider still moves, so that no key press is lost.
 */
export function readableCutOff(value: number, axis: ValueAxis): number {
  const at = axis.fractionOf(value)
  const step = axis.valueAt(Math.min(1, at + 1 / STEPS)) - axis.valueAt(Math.max(0, at - 1 / STEPS))
  const decimals = -Math.floor(Math.log10(step / 2))
  if (decimals < 0) {
    const unit = 10 ** -decimals
    return Math.round(value / unit) * unit
  }
  return Number(value.toFixed(Math.min(decimals, 20)))
}
