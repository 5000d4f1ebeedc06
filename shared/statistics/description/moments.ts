/**
 * Mean and SD (divisor n − 1) of n ≥ 2 finite values.
 * Sums are compensated (Neumaier 1974), so that a long series far from 0 keeps its digits.
 */
export function moments(values: ArrayLike<number>): { n: number; mean: number; sd: number } {
  const n = values.length
  const mean = compensatedSum(n, (i) => values[i]!) / n
  const squares = compensatedSum(n, (i) => (values[i]! - mean) ** 2)
  return { n, mean, sd: Math.sqrt(squares / (n - 1)) }
}

function compensatedSum(n: number, term: (i: number) => number): number {
  let sum = 0
  let lost = 0
  for (let i = 0; i < n; i++) {
    const value = term(i)
    const next = sum + value
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum
    sum = next
  }
  return sum + lost
}
