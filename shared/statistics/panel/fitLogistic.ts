import { requireFinite } from '../requireFinite.ts'
import { StatisticsError } from '../StatisticsError.ts'
import { invertPositive } from './invertPositive.ts'

export type Predictor = { name: string; values: ArrayLike<number> }

/** Complete cases: every predictor and the outcome of the same subjects in the same order. */
export type LogisticData = { predictors: Predictor[]; outcomes: ArrayLike<boolean | number> }

export type LogisticFit = {
  n: number
  nPresent: number
  coefficients: number[]
  covariance: number[][]
  fitted: Float64Array
  logLikelihood: number
}

/** Column-wise design, each predictor less its mean and divided by its SD. */
type Design = { columns: Float64Array[]; means: number[]; sds: number[] }

/**
 * The bare maximum-likelihood fit, by Newton's method on standardised predictors (halving steps that do
 * not climb); the covariance is the inverse information at the estimate itself.
 * @throws StatisticsError see logisticRegression
 */
export function fitLogistic(data: LogisticData): LogisticFit {
  const y = Uint8Array.from({ length: data.outcomes.length }, (_, i) => (data.outcomes[i] ? 1 : 0))
  requireFittable(data, y)
  const n = y.length
  const design = standardised(data.predictors, n)
  const nPresent = y.reduce((sum, one) => sum + one, 0)
  const beta = climb(design.columns, y, Math.log(nPresent / (n - nPresent)))
  const state = evaluate(design.columns, y, beta)
  const covariance = invertPositive(state.information)
  return {
    n,
    nPresent,
    ...unstandardised(beta, covariance, design),
    fitted: state.fitted,
    logLikelihood: state.logLikelihood,
  }
}

function requireFittable({ predictors, outcomes }: LogisticData, y: Uint8Array): void {
  const n = y.length
  if (predictors.length === 0) throw new StatisticsError('too-few', 'A model needs a predictor.')
  if (n <= predictors.length + 1) {
    throw new StatisticsError('too-few', 'A model needs more subjects than terms.')
  }
  for (const { name, values } of predictors) {
    if (values.length !== outcomes.length) {
      throw new StatisticsError('unequal-length', `"${name}" is not there for every subject.`)
    }
    requireFinite(values, `The values of "${name}"`)
  }
  const present = y.reduce((sum, one) => sum + one, 0)
  if (present === 0 || present === n) {
    throw new StatisticsError('one-class', 'Both reference outcomes are needed.')
  }
}

function standardised(predictors: Predictor[], n: number): Design {
  const columns = [new Float64Array(n).fill(1)]
  const means = [0]
  const sds = [1]
  for (const { name, values } of predictors) {
    let mean = 0
    for (let i = 0; i < n; i++) mean += values[i]! / n
    let squares = 0
    for (let i = 0; i < n; i++) squares += (values[i]! - mean) ** 2
    const sd = Math.sqrt(squares / n)
    if (!(sd > 1e-12 * Math.abs(mean))) {
      throw new StatisticsError('constant', `"${name}" has one value only.`)
    }
    columns.push(Float64Array.from(values, (value) => (value - mean) / sd))
    means.push(mean)
    sds.push(sd)
  }
  return { columns, means, sds }
}

function evaluate(columns: Float64Array[], y: Uint8Array, beta: number[]) {
  const n = y.length
  const k = columns.length
  const fitted = new Float64Array(n)
  const score = new Array<number>(k).fill(0)
  const information = Array.from({ length: k }, () => new Array<number>(k).fill(0))
  let logLikelihood = 0
  for (let i = 0; i < n; i++) {
    let eta = 0
    for (let a = 0; a < k; a++) eta += beta[a]! * columns[a]![i]!
    const p = 1 / (1 + Math.exp(-eta))
    fitted[i] = p
    // ln p or ln(1 − p) without losing digits at the ends
    const signed = y[i] === 1 ? -eta : eta
    logLikelihood -=
      signed > 0 ? signed + Math.log1p(Math.exp(-signed)) : Math.log1p(Math.exp(signed))
    const weight = p * (1 - p)
    for (let a = 0; a < k; a++) {
      const x = columns[a]![i]!
      score[a]! += (y[i]! - p) * x
      for (let b = 0; b <= a; b++) information[a]![b]! += weight * x * columns[b]![i]!
    }
  }
  for (let a = 0; a < k; a++) for (let b = 0; b < a; b++) information[b]![a] = information[a]![b]!
  return { fitted, score, information, logLikelihood }
}

function climb(columns: Float64Array[], y: Uint8Array, start: number): number[] {
  const k = columns.length
  let beta = [start, ...new Array<number>(k - 1).fill(0)]
  let state = evaluate(columns, y, beta)
  for (let step = 0; step < 40; step++) {
    const inverse = invertPositive(state.information)
    const move = inverse.map((row) => row.reduce((s, v, b) => s + v * state.score[b]!, 0))
    let scale = 1
    let next = beta
    let reached = state
    for (let halving = 0; halving < 30; halving++) {
      next = beta.map((b, a) => b + scale * move[a]!)
      reached = evaluate(columns, y, next)
      if (reached.logLikelihood >= state.logLikelihood - 1e-12 * Math.abs(state.logLikelihood))
        break
      scale /= 2
    }
    beta = next
    state = reached
    if (Math.max(...move.map(Math.abs)) < 1e-9) return beta
    if (-2 * state.logLikelihood < 1e-8) break
  }
  throw new StatisticsError(
    'separation',
    'A combination of the predictors tells (nearly) all subjects apart, so the coefficients have no finite value. Use fewer predictors or more subjects.',
  )
}

/** Takes coefficients and covariance back to the predictors' own units. */
function unstandardised(beta: number[], covariance: number[][], { means, sds }: Design) {
  const k = beta.length
  const transform = Array.from({ length: k }, (_, a) =>
    Array.from({ length: k }, (_, b) => {
      if (a === 0) return b === 0 ? 1 : -means[b]! / sds[b]!
      return a === b ? 1 / sds[b]! : 0
    }),
  )
  const coefficients = transform.map((row) => row.reduce((s, v, b) => s + v * beta[b]!, 0))
  const half = transform.map((row) =>
    beta.map((_, c) => row.reduce((s, v, b) => s + v * covariance[b]![c]!, 0)),
  )
  const full = half.map((row) =>
    transform.map((other) => other.reduce((s, v, c) => s + v * row[c]!, 0)),
  )
  return { coefficients, covariance: full }
}
