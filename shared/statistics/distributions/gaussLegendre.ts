const known = new Map<number, { node: number; weight: number }[]>()

/**
 * Nodes and weights of the n-point Gauss–Legendre rule on −1…1, by Newton on the Legendre polynomial;
 * computed once for each n.
 * Source: NIST DLMF 3.5(v), 18.9.1 (recurrence).
 */
export function gaussLegendre(n: number): readonly { node: number; weight: number }[] {
  const stored = known.get(n)
  if (stored) return stored
  const rule = []
  for (let k = 1; k <= n; k++) {
    let x = Math.cos((Math.PI * (k - 0.25)) / (n + 0.5))
    let slope = 1
    for (let step = 0; step < 20; step++) {
      let previous = 1
      let current = x
      for (let j = 2; j <= n; j++) {
        const next = ((2 * j - 1) * x * current - (j - 1) * previous) / j
        previous = current
        current = next
      }
      slope = (n * (x * current - previous)) / (x * x - 1)
      x -= current / slope
    }
    rule.push({ node: x, weight: 2 / ((1 - x * x) * slope * slope) })
  }
  known.set(n, rule)
  return rule
}
