import { existsSync, readFileSync } from 'node:fs'
import { resolve } from 'node:path'

/** Data sets of others, with what R gave for them: they lie beside the checkout and are never copied. */
const FOLDER = resolve(process.env.BREATHMARK_REFERENCES ?? '../shared')

/** Whether a file of that folder is there; a test that needs it is skipped where it is not. */
export const hasReference = (path: string): boolean => existsSync(resolve(FOLDER, path))

/** Rows of a CSV by heading, without quotes; no field of these files holds a comma. */
export function referenceRows(path: string): Record<string, string>[] {
  const [head = '', ...lines] = readFileSync(resolve(FOLDER, path), 'utf8').trim().split(/\r?\n/)
  const names = head.replaceAll('"', '').split(',')
  return lines.map((line) => {
    const fields = line.replaceAll('"', '').split(',')
    return Object.fromEntries(names.map((name, at) => [name, fields[at] ?? '']))
  })
}

/** The value that a record of a results file gives. */
export function referenceValue<T>(path: string, marker: string, quantity: string): T {
  const { records } = JSON.parse(readFileSync(resolve(FOLDER, path), 'utf8')) as {
    records: { marker: string; quantity: string; value: T }[]
  }
  const record = records.find((each) => each.marker === marker && each.quantity === quantity)
  if (!record) throw new Error(`${path} holds no ${quantity} of ${marker}.`)
  return record.value
}
