import { StatisticsError } from '../StatisticsError.ts'

/**
 * Inverse of a symmetric positive definite matrix by Cholesky's factors.
 * @throws StatisticsError 'collinear' where it is singular
 * Source: Golub & Van Loan 2013, Matrix Computations, section 4.2.
 */
export function invertPositive(matrix: number[][]): number[][] {
  const n = matrix.length
  const lower = matrix.map((row) => row.map(() => 0))
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = matrix[i]![j]!
      for (let k = 0; k < j; k++) sum -= lower[i]![k]! * lower[j]![k]!
      if (i === j) {
        if (!(sum > 1e-11 * matrix[i]![i]!)) {
          throw new StatisticsError('collinear', 'One predictor is a combination of the others.')
        }
        lower[i]![i] = Math.sqrt(sum)
      } else lower[i]![j] = sum / lower[j]![j]!
    }
  }
  const inverse = matrix.map((row) => row.map(() => 0))
  for (let column = 0; column < n; column++) {
    const solved = new Array<number>(n).fill(0)
    for (let i = 0; i < n; i++) {
      let sum = i === column ? 1 : 0
      for (let k = 0; k < i; k++) sum -= lower[i]![k]! * solved[k]!
      solved[i] = sum / lower[i]![i]!
    }
    for (let i = n - 1; i >= 0; i--) {
      let sum = solved[i]!
      for (let k = i + 1; k < n; k++) sum -= lower[k]![i]! * inverse[k]![column]!
      inverse[i]![column] = sum / lower[i]![i]!
    }
  }
  return inverse
}
