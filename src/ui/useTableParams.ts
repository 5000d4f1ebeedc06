import { useCallback, useMemo, useState } from 'react'
import { useLocation, useSearchParams } from 'react-router-dom'

export type TableSort = { id: string; desc: boolean }
type EarlierPage = { after: string | null; from: number }

/** Where a table stands: what it is ordered by, what it is narrowed to, and which page it shows. */
export type TableParams = {
  sort: TableSort | null
  filters: Readonly<Record<string, string>>
  /** The key that this page starts after; null for the first page. */
  after: string | null
  /** How many rows come before this page; null when nobody counted them (opened by its address). */
  before: number | null
  /** For the query: "age" or "-age", the page key and the filters. */
  request: Readonly<Record<string, string | undefined>>
  setSort: (sort: TableSort | null) => void
  setFilter: (name: string, value: string) => void
  clearFilters: () => void
  /** All rows in the first order, from the first page. */
  reset: () => void
  goNext: (key: string, rowsHere: number) => void
  goPrevious: () => void
}

type Options<Name extends string> = {
  /** The names of the filters; each is a search parameter. */
  filters?: readonly Name[]
  /** The order to begin with, as in the address: "age" or "-age". */
  sort?: string
  /** Keeps two tables of a page apart. */
  prefix?: string
}

const NO_NAMES: readonly never[] = []

/** Keeps order, filters and page key in the address, so that a link shows the same rows again. */
export function useTableParams<Name extends string>({
  filters: names = NO_NAMES,
  sort: firstSort,
  prefix = '',
}: Options<Name> = {}): TableParams {
  const [search, setSearch] = useSearchParams()
  const location = useLocation()
  const trailName = `${prefix}trail`
  const trail = readTrail(location.state, trailName)
  const nameList = names.join('\n')

  const change = useCallback(
    (changes: Record<string, string | null>, nextTrail: EarlierPage[], replace: boolean) => {
      setSearch(
        (current) => {
          const next = new URLSearchParams(current)
          for (const [name, value] of Object.entries(changes)) {
            if (value === null || value === '') next.delete(prefix + name)
            else next.set(prefix + name, value)
          }
          return next
        },
        { replace, preventScrollReset: true, state: { [trailName]: nextTrail } },
      )
    },
    [setSearch, prefix, trailName],
  )

  const sortText = search.get(`${prefix}sort`) ?? firstSort
  const after = search.get(`${prefix}after`)
  const searchText = search.toString()
  const filters = useMemo(() => {
    const values = new URLSearchParams(searchText)
    const found: Record<string, string> = {}
    for (const name of nameList.split('\n')) {
      const value = values.get(prefix + name)
      if (name !== '' && value) found[name] = value
    }
    return found
  }, [searchText, nameList, prefix])

  return {
    sort: readSort(sortText),
    filters,
    after,
    before: after === null ? 0 : (trail.at(-1)?.from ?? null),
    request: { ...filters, sort: sortText, after: after ?? undefined },
    setSort: (sort) => change({ sort: writeSort(sort), after: null }, [], true),
    setFilter: (name, value) => change({ [name]: value, after: null }, [], true),
    clearFilters: () =>
      change({ ...Object.fromEntries(names.map((name) => [name, null])), after: null }, [], true),
    reset: () =>
      change(
        { ...Object.fromEntries(names.map((name) => [name, null])), sort: null, after: null },
        [],
        true,
      ),
    goNext: (key, rowsHere) => {
      const from = (trail.at(-1)?.from ?? 0) + rowsHere
      change({ after: key }, [...trail, { after, from }], false)
    },
    goPrevious: () => change({ after: trail.at(-1)?.after ?? null }, trail.slice(0, -1), false),
  }
}

/** The same for a table whose state need not be in the address, such as one in a dialog. */
export function useLocalTableParams(firstSort?: string): TableParams {
  const [sort, setSort] = useState(() => readSort(firstSort))
  const [pages, setPages] = useState<EarlierPage[]>([])
  const [filters, setFilters] = useState<Record<string, string>>({})
  const here = pages.at(-1)
  return {
    sort,
    filters,
    after: here?.after ?? null,
    before: here?.from ?? 0,
    request: { ...filters, sort: writeSort(sort) ?? undefined, after: here?.after ?? undefined },
    setSort: (next) => {
      setSort(next)
      setPages([])
    },
    setFilter: (name, value) => {
      setFilters((current) => ({ ...current, [name]: value }))
      setPages([])
    },
    clearFilters: () => {
      setFilters({})
      setPages([])
    },
    reset: () => {
      setSort(readSort(firstSort))
      setFilters({})
      setPages([])
    },
    goNext: (key, rowsHere) =>
      setPages((all) => [...all, { after: key, from: (all.at(-1)?.from ?? 0) + rowsHere }]),
    goPrevious: () => setPages((all) => all.slice(0, -1)),
  }
}

function readSort(text: string | undefined): TableSort | null {
  if (!text) return null
  return text.startsWith('-') ? { id: text.slice(1), desc: true } : { id: text, desc: false }
}

function writeSort(sort: TableSort | null): string | null {
  return sort && (sort.desc ? `-${sort.id}` : sort.id)
}

/** The browser keeps a history entry's state over a reload; it may also hold something else's. */
function readTrail(state: unknown, name: string): EarlierPage[] {
  if (typeof state !== 'object' || state === null || !(name in state)) return []
  const trail = (state as Record<string, unknown>)[name]
  return Array.isArray(trail) ? (trail as EarlierPage[]) : []
}
