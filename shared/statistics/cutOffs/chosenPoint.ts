import type { RocCurve } from '../accuracy/rocCurve.ts'

/** How a cut-off is chosen from data. */
export type CutOffRule =
  | { kind: 'youden' }
  | { kind: 'closestToCorner' }
  | { kind: 'sensitivityAtLeast'; least: number }
  | { kind: 'specificityAtLeast'; least: number }

/**
 * The number of the curve's point that a rule chooses; of ties the strictest. The light form of
 * cutOffRules for resampling.
 */
export function chosenPoint(curve: RocCurve, rule: CutOffRule): number {
  const { nPresent, nAbsent, truePositives, falsePositives } = curve
  const score = scoreOf(rule, nPresent, nAbsent)
  let best = -Infinity
  let chosen = 0
  for (let k = 0; k < truePositives.length; k++) {
    const value = score(truePositives[k]!, falsePositives[k]!)
    if (value > best) {
      best = value
      chosen = k
    }
  }
  return chosen
}

/** Larger is better; −Infinity where the rule's condition does not hold. */
function scoreOf(rule: CutOffRule, m: number, n: number): (tp: number, fp: number) => number {
  switch (rule.kind) {
    case 'youden':
      return (tp, fp) => tp * n - fp * m
    case 'closestToCorner':
      return (tp, fp) => -(((m - tp) * n) ** 2 + (fp * m) ** 2)
    case 'sensitivityAtLeast': {
      const needed = Math.ceil(rule.least * m - 1e-9)
      return (tp, fp) => (tp >= needed ? -fp : -Infinity)
    }
    case 'specificityAtLeast': {
      const needed = Math.ceil(rule.least * n - 1e-9)
      return (tp, fp) => (n - fp >= needed ? tp : -Infinity)
    }
  }
}
