import { existsSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { describe, expect, test } from 'vitest'
import { checkFolder, surroundingsOf } from './harness/checkFolder.ts'
import { type Actual, compare, NOT_COMPARED } from './harness/compare.ts'
import { quantityFor } from './harness/quantityFor.ts'
import type { Json, Tolerance } from './harness/ReferenceRecord.ts'
import { readFolder } from './harness/readFolder.ts'

const here = dirname(fileURLToPath(import.meta.url))
const own = join(here, 'references')
const shared = resolve(here, '../../../shared/reference')

describe('the project’s own references', () => {
  test('are all met, and none is left uncovered', () => {
    const report = checkFolder(own)
    expect(report.failures).toEqual([])
    expect(report.notCovered).toEqual([])
    expect(report.checked).toBeGreaterThan(280)
  })

  test('would be missed if any single number of them were otherwise', () => {
    const folder = readFolder(own)
    const unnoticed: string[] = []
    let changed = 0
    for (const { record } of folder.records) {
      const actual = quantityFor(record.quantity)!(surroundingsOf(record, folder))
      for (const { path, value } of alterations(record.value, actual, record.tolerance)) {
        changed++
        if (compare(value, actual, record.tolerance).length === 0) {
          unnoticed.push(`${record.dataset} ${record.marker} ${record.quantity} ${path}`)
        }
      }
    }
    expect(unnoticed).toEqual([])
    expect(changed).toBeGreaterThan(4000)
  })

  test('count a quantity that nobody knows as not covered', () => {
    expect(quantityFor('auc')).toBeDefined()
    expect(quantityFor('partial_auc_spec_0.8_1')).toBeDefined()
    expect(quantityFor('area_under_the_moon')).toBeUndefined()
    expect(quantityFor('toString')).toBeUndefined()
  })
})

describe.skipIf(!existsSync(shared))(
  'the larger reference set (skipped where ../shared/reference is not beside the checkout)',
  () => {
    test('is met in full', () => {
      const report = checkFolder(shared)
      expect(report.failures).toEqual([])
      expect(report.notCovered).toEqual([])
      expect(report.checked).toBeGreaterThan(200)
    })
  },
)

/** Each compared number of a value in turn, moved by twenty times its tolerance. */
function* alterations(
  value: Json,
  actual: Actual,
  tolerance: Tolerance,
  path = '',
): Generator<{ path: string; value: Json }> {
  if (actual === NOT_COMPARED) return
  if (typeof value === 'number') {
    // where the product has no value, a finite number stands beside one that is not
    if (actual === null) return
    const floor = tolerance.type === 'relative' ? (tolerance.floor ?? 0) : 0
    const step = tolerance.type === 'absolute' ? tolerance.size : tolerance.size * Math.abs(value)
    yield { path, value: value + 20 * (step + floor) }
  } else if (Array.isArray(value)) {
    for (let i = 0; i < value.length; i += Math.max(1, Math.floor(value.length / 50))) {
      const inner = (actual as Actual[])[i]!
      for (const changed of alterations(value[i]!, inner, tolerance, `${path}[${i}]`)) {
        yield { path: changed.path, value: value.with(i, changed.value) }
      }
    }
  } else if (value !== null && typeof value === 'object') {
    for (const [key, member] of Object.entries(value)) {
      const inner = (actual as { [key: string]: Actual } | null)?.[key] ?? null
      for (const changed of alterations(member, inner, tolerance, `${path}.${key}`)) {
        yield { path: changed.path, value: { ...value, [key]: changed.value } }
      }
    }
  }
}
