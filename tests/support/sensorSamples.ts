import { readFileSync } from 'node:fs'
import { expect } from 'vitest'

const folder = new URL('../statistics/references/', import.meta.url)
export const textOf = (name: string) => readFileSync(new URL(`data/${name}.csv`, folder), 'utf8')
export type Value = Record<string, number & Record<string, number>>
/** Values of numpy 1.24.2 and scipy 1.10.1: tests/statistics/references/SOURCES.md. */
export const valuesOf = (file: string, quantity: string): Value[] => {
  const { records } = JSON.parse(readFileSync(new URL(`results/${file}.json`, folder), 'utf8'))
  const found = records.filter((record: { quantity: string }) => record.quantity === quantity)
  expect(found.length).toBeGreaterThan(0)
  return found.map(({ value }: { value: Value }) => value)
}

export const close = (value: number | null | undefined, wanted: number) =>
  expect(Math.abs(value! - wanted)).toBeLessThanOrEqual(1e-9 * Math.abs(wanted))
