import { useCallback, useState } from 'react'

/**
 * Something typed that is not on the server yet: kept for this tab, so that a reload loses nothing.
 * It ends with the tab, and when it is cleared.
 */
export function useTabDraft<T>(name: string): {
  first: T | null
  keep: (value: T) => void
  clear: () => void
} {
  const key = `breathmark.${name}`
  const [first] = useState<T | null>(() => read(key))
  const keep = useCallback((value: T) => sessionStorage.setItem(key, JSON.stringify(value)), [key])
  const clear = useCallback(() => sessionStorage.removeItem(key), [key])
  return { first, keep, clear }
}

function read<T>(key: string): T | null {
  const text = sessionStorage.getItem(key)
  return text === null ? null : (JSON.parse(text) as T)
}
