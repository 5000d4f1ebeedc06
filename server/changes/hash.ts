import { createHash } from 'node:crypto'

/** JSON with sorted keys and no blanks: the same value has one text (after RFC 8785). Dates become UTC ISO strings. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_key, each: unknown) => {
    if (each && typeof each === 'object' && !Array.isArray(each)) {
      const entries = Object.entries(each as Record<string, unknown>)
      return Object.fromEntries(entries.sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)))
    }
    return each
  })
}

/** SHA-256 as 64 lower-case hexadecimal digits. */
export const sha256Hex = (content: string | Uint8Array): string =>
  createHash('sha256').update(content).digest('hex')
