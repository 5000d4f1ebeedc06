import { pairColumns, pairTable } from './agreementInput.ts'
import type { Actual } from './compare.ts'
import { completePairs } from './completePairs.ts'
import type { Quantities, Surroundings } from './Quantity.ts'
import { classesOf, curveOf } from './rocInput.ts'

export const countQuantities: Quantities = {
  /** Complete cases of a marker, or complete pairs of two methods: told apart by the record's keys. */
  counts: (s) => ('cases' in s.given ? completeCases(s) : completePairsOf(s)),
}

function completeCases(s: Surroundings): Actual {
  const { present, absent, missingValues } = classesOf(s)
  return {
    n: present.length + absent.length,
    cases: present.length,
    controls: absent.length,
    missing: missingValues,
    distinct_values: curveOf(s).thresholds.length - 1,
  }
}

function completePairsOf(s: Surroundings): Actual {
  const [a, b] = pairColumns(s.record.marker)
  const table = pairTable(s)
  const { first, dropped } = completePairs(table.numbers(a), table.numbers(b))
  return { n: first.length, dropped_incomplete: dropped }
}
