import { StatisticsError } from '#shared/statistics/StatisticsError.ts'
import { compare } from './compare.ts'
import type { Quantity, Surroundings } from './Quantity.ts'
import { quantityFor } from './quantityFor.ts'
import type { Json, ReferenceRecord } from './ReferenceRecord.ts'
import { type ReferenceFolder, readFolder } from './readFolder.ts'

export type CheckReport = {
  checked: number
  failed: number
  /** One sentence for each number that differs and each record that could not be answered. */
  failures: string[]
  notCovered: string[]
}

/** Checks every record of `folder/results/*.json` against the product, with the tables of `folder/data`. */
export function checkFolder(folder: string): CheckReport {
  const report: CheckReport = { checked: 0, failed: 0, failures: [], notCovered: [] }
  const read = readFolder(folder)
  for (const { file, record } of read.records) {
    const title = `${file}: ${record.dataset} | ${record.marker} | ${record.quantity}`
    const quantity = quantityFor(record.quantity)
    if (quantity === undefined) {
      report.notCovered.push(title)
      continue
    }
    report.checked += 1
    const differences = differencesOf(quantity, surroundingsOf(record, read))
    if (differences.length > 0) report.failed += 1
    report.failures.push(...differences.map((difference) => `${title} | ${difference}`))
  }
  return report
}

export function surroundingsOf(record: ReferenceRecord, folder: ReferenceFolder): Surroundings {
  const { value } = record
  const given = value !== null && typeof value === 'object' && !Array.isArray(value) ? value : {}
  return { record, given, table: folder.table, tables: folder.tables }
}

function differencesOf(quantity: Quantity, surroundings: Surroundings): string[] {
  const { value, tolerance } = surroundings.record
  try {
    return compare(value, quantity(surroundings), tolerance)
  } catch (error) {
    // a coded refusal is the right answer where the library found nothing either
    if (error instanceof StatisticsError) {
      const agreed = hasNoFiniteNumber(value)
      return agreed ? [] : [`the product refuses (${error.code}): ${error.message}`]
    }
    return [`could not be asked: ${error instanceof Error ? error.message : String(error)}`]
  }
}

function hasNoFiniteNumber(value: Json): boolean {
  if (typeof value === 'number') return false
  if (value === null || typeof value !== 'object') return true
  return Object.values(value).every(hasNoFiniteNumber)
}
