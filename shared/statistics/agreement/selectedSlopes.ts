import { nthSmallest } from '../description/nthSmallest.ts'
import { sortedOrder } from '../description/sortedOrder.ts'
import { randomStream } from '../random/randomStream.ts'
import { MINUS_ONE_TOLERANCE } from './allSlopes.ts'
import { countInversions } from './countInversions.ts'
import { forEachInversion } from './forEachInversion.ts'
import type { SlopeRanks } from './passingBablokRegression.ts'
import { verticalSlopes } from './verticalSlopes.ts'

/** Slopes held in memory at a time (32 MB); a bracket with more is narrowed or counted by value. */
const HELD = 4_000_000
const SAMPLED = 200_000

/** Points from left to right, those above each other from bottom to top. */
type Points = { x: Float64Array; y: Float64Array }

/** An interval of slopes with the number of slopes below each end. */
type Bracket = { low: number; high: number; belowLow: number; belowHigh: number }

/**
 * The same answers as allSlopes without listing them. Two points change their order by y − s·x where s
 * passes their slope, so slopes below s are inversions, and the slopes between two values are the
 * inversions between two orders. A rank is bracketed from a sample of slopes, the bracket's slopes are
 * listed and the rank selected among them: exact, whatever the sample.
 * Source: Cole, Salowe, Steiger & Szemerédi 1989, SIAM J Comput 18:792; sampling Matoušek 1991,
 * Inf Process Lett 39:183; for this regression Raymaekers & Dufey 2022, arXiv:2202.08060.
 */
export function selectedSlopes(x: Float64Array, y: Float64Array): SlopeRanks {
  const n = x.length
  const vertical = verticalSlopes(x, y)
  const points = leftToRight(x, y)
  const finite = (n * (n - 1)) / 2 - vertical.pairs
  const near = { low: -1 - 1e-6, high: -1 + 1e-6 }
  let below = countBelow(points, near.low)
  let slopesOfMinusOne = 0
  forEachSlope(points, near.low, near.high, (slope) => {
    if (Math.abs(slope + 1) < MINUS_ONE_TOLERANCE) slopesOfMinusOne++
    else if (slope < -1) below++
  })
  const offset = below + vertical.downwards
  const sample = sampledSlopes(points)
  const at = (rank: number): number => {
    if (rank <= vertical.downwards) return -Infinity
    // slopes of −1 are left out of the ranks: step over them
    const position = rank - vertical.downwards + (rank > offset ? slopesOfMinusOne : 0)
    return position > finite ? Infinity : slopeAt(points, position, finite, sample)
  }
  return {
    slopes: finite - slopesOfMinusOne + vertical.downwards + vertical.upwards,
    offset,
    identicalPoints: vertical.identicalPoints,
    slopesOfMinusOne,
    at: (ranks) => ranks.map(at),
  }
}

function leftToRight(x: Float64Array, y: Float64Array): Points {
  const byY = sortedOrder(y, 'The y values')
  const byX = sortedOrder(
    Float64Array.from(byY, (i) => x[i]!),
    'The x values',
  )
  return {
    x: Float64Array.from(byX, (k) => x[byY[k]!]!),
    y: Float64Array.from(byX, (k) => y[byY[k]!]!),
  }
}

function countBelow({ x, y }: Points, slope: number): number {
  return countInversions(y.map((value, i) => value - slope * x[i]!))
}

/** Visits the slopes from `low` (with it) up to `high` (without it), up to rounding at the ends. */
function forEachSlope(
  { x, y }: Points,
  low: number,
  high: number,
  visit: (slope: number) => void,
): void {
  const labels = sortedOrder(
    y.map((value, i) => value - low * x[i]!),
    'The residuals',
  )
  const keys = Float64Array.from(labels, (i) => y[i]! - high * x[i]!)
  forEachInversion(keys, labels, (i, j) => visit((y[j]! - y[i]!) / (x[j]! - x[i]!)))
}

function sampledSlopes({ x, y }: Points): Float64Array {
  // the seed only moves the first bracket, never the answer
  const random = randomStream(1983)
  const n = x.length
  const slopes = new Float64Array(SAMPLED)
  let drawn = 0
  for (let tries = 0; drawn < SAMPLED && tries < 20 * SAMPLED; tries++) {
    const i = Math.floor(random() * n)
    const j = Math.floor(random() * n)
    if (x[i] !== x[j]) slopes[drawn++] = (y[j]! - y[i]!) / (x[j]! - x[i]!)
  }
  return slopes.subarray(0, drawn).sort()
}

function slopeAt(points: Points, position: number, finite: number, sample: Float64Array): number {
  let bracket = narrowed(points, position, firstBracket(points, position, finite, sample))
  for (;;) {
    const slope = selectIn(points, position, bracket)
    const width = bracket.high - bracket.low
    // too near an end, rounding could have put neighbours on the wrong side of it
    const margin = 1e-10 * Math.max(Math.abs(bracket.low), Math.abs(bracket.high))
    if (slope - bracket.low > margin && bracket.high - slope > margin) return slope
    bracket = measured(points, bracket.low - width - 4 * margin, bracket.high + width + 4 * margin)
  }
}

function measured(points: Points, low: number, high: number): Bracket {
  return { low, high, belowLow: countBelow(points, low), belowHigh: countBelow(points, high) }
}

/** Five standard errors of the sample's quantile to each side, widened until it holds the position. */
function firstBracket(
  points: Points,
  position: number,
  finite: number,
  sample: Float64Array,
): Bracket {
  const share = position / finite
  const r = sample.length
  let reach = 5 * Math.sqrt(share * (1 - share) * r) + 10
  for (;;) {
    const left = Math.floor(share * r - reach)
    const right = Math.ceil(share * r + reach)
    const span = sample[r - 1]! - sample[0]! + Math.abs(sample[0]!) + 1
    const low = left < 0 ? sample[0]! - span * (-left / r) : sample[left]!
    const high = right >= r ? sample[r - 1]! + span * ((right - r + 1) / r) : sample[right]!
    const bracket = measured(points, low, high)
    if (bracket.belowLow < position && bracket.belowHigh >= position) return bracket
    reach *= 4
  }
}

/** Moves the ends inwards by interpolation until the bracket's slopes can be held. */
function narrowed(points: Points, position: number, first: Bracket): Bracket {
  const bracket = { ...first }
  for (let step = 0; step < 60; step++) {
    const inside = bracket.belowHigh - bracket.belowLow
    const width = bracket.high - bracket.low
    const size = Math.max(Math.abs(bracket.low), Math.abs(bracket.high))
    if (inside <= HELD || width < 1e-7 * size) break
    // every third step halves, in case the slopes bunch up inside
    const aim = step % 3 === 2 ? inside / 2 : position - bracket.belowLow
    for (const side of [-1, 1]) {
      const share = Math.min(0.98, Math.max(0.02, (aim + (side * HELD) / 3) / inside))
      const slope = bracket.low + width * share
      if (!(slope > bracket.low && slope < bracket.high)) continue
      const below = countBelow(points, slope)
      if (below < position) Object.assign(bracket, { low: slope, belowLow: below })
      else Object.assign(bracket, { high: slope, belowHigh: below })
    }
  }
  return bracket
}

function selectIn(points: Points, position: number, bracket: Bracket): number {
  const rank = position - bracket.belowLow
  const inside = bracket.belowHigh - bracket.belowLow
  if (inside > HELD) return selectTied(points, rank, bracket)
  const held = new Float64Array(inside + 1024)
  let count = 0
  forEachSlope(points, bracket.low, bracket.high, (slope) => {
    held[count++] = slope
  })
  return nthSmallest(held.subarray(0, count), rank)
}

/** In a bracket this narrow so many slopes are ties: count each value. */
function selectTied(points: Points, rank: number, { low, high }: Bracket): number {
  const counts = new Map<number, number>()
  forEachSlope(points, low, high, (slope) => {
    counts.set(slope, (counts.get(slope) ?? 0) + 1)
  })
  const values = [...counts.keys()].sort((a, b) => a - b)
  let passed = 0
  for (const value of values) {
    passed += counts.get(value)!
    if (passed >= rank) return value
  }
  return values.at(-1)!
}
