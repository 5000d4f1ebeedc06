/** Enough to see what moved. */
const MOST = 20

type Difference = { path: string; stored: string; repeated: string }

/** Where two results differ, as paths such as `area.lower`; at most twenty. */
export function differencesOf(stored: unknown, repeated: unknown, path = ''): Difference[] {
  if (isObject(stored) && isObject(repeated)) {
    const keys = new Set([...Object.keys(stored), ...Object.keys(repeated)])
    return [...keys]
      .flatMap((key) =>
        differencesOf(stored[key], repeated[key], path === '' ? key : `${path}.${key}`),
      )
      .slice(0, MOST)
  }
  if (Object.is(stored, repeated)) return []
  return [{ path, stored: written(stored), repeated: written(repeated) }]
}

const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null

const written = (value: unknown): string => JSON.stringify(value) ?? 'nothing'
