/** Difference of two values as a percentage of their mean; 0 where both are 0. */
export function percentOfMean(a: number, b: number): number {
  const difference = Math.abs(a - b)
  return difference === 0 ? 0 : (100 * difference) / Math.abs((a + b) / 2)
}
