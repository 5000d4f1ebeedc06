import { StatisticsError } from '../StatisticsError.ts'

/** Where the distribution function stands at x, less the wanted probability, and its density. */
export type Excess = { excess: number; density: number }

/**
 * The x at which an increasing function crosses 0: Newton steps, kept inside a bracket by bisection.
 * @param at excess of the distribution function over the wanted probability, and the density
 * @param bracket two points between which the answer lies
 * @param start a first guess; the middle of the bracket where it lies outside
 * @throws StatisticsError 'no-convergence'
 */
export function solveQuantile(
  at: (x: number) => Excess,
  bracket: { lower: number; upper: number },
  start: number,
): number {
  let { lower, upper } = bracket
  let x = start > lower && start < upper ? start : (lower + upper) / 2
  for (let step = 0; step < 400; step++) {
    const { excess, density } = at(x)
    if (excess === 0) return x
    if (excess > 0) upper = x
    else lower = x
    const newton = x - excess / density
    const next = newton > lower && newton < upper ? newton : (lower + upper) / 2
    if (Math.abs(next - x) <= 2e-16 * Math.abs(next) || next === lower || next === upper)
      return next
    x = next
  }
  // rounding can keep Newton hopping between neighbours of the answer
  if (upper - lower <= 1e-13 * Math.max(Math.abs(lower), Math.abs(upper))) return x
  throw new StatisticsError('no-convergence', 'A quantile could not be found.')
}
