import { useSearchParams } from 'react-router-dom'
import { plannedCutOff } from '#shared/analyses/asProtocol.ts'
import type { Dataset } from '#shared/schemas/dataset.ts'
import {
  ANALYSIS_KINDS,
  type AnalysisKind,
  SESSION_RULES,
  type SessionRule,
} from '#shared/terms/analysis.ts'
import { DIRECTIONS, type Direction } from '#shared/terms/protocol.ts'

/** What is explored; kept in the address. The cut-off moves too often for that. */
export type ExplorerSettings = {
  kind: AnalysisKind
  analyteKey: string
  /** Analyte of the reference values, for agreement and rank correlation. */
  referenceKey: string
  sessionRule: SessionRule
  direction: Direction
}

/** Settings from the address, and what the protocol says where the address says nothing. */
export function useExplorerSettings(dataset: Dataset) {
  const [search, setSearch] = useSearchParams()
  const settings = settingsFrom(search, dataset)
  const change = (changes: Partial<ExplorerSettings>) =>
    setSearch({ ...settings, ...changes }, { replace: true, preventScrollReset: true })
  return [settings, change] as const
}

function settingsFrom(search: URLSearchParams, { manifest, protocol }: Dataset): ExplorerSettings {
  const kind = oneOf(ANALYSIS_KINDS, search.get('kind')) ?? 'accuracy'
  const keys = manifest.analytes.map((analyte) => analyte.key)
  const first = keys.includes(protocol.primaryAnalyteKey) ? protocol.primaryAnalyteKey : keys[0]
  const analyteKey = oneOf(keys, search.get('analyteKey')) ?? first ?? ''
  const biomarker = protocol.biomarkers.find((each) => each.analyteKey === analyteKey)
  return {
    kind,
    analyteKey,
    referenceKey: oneOf(keys, search.get('referenceKey')) ?? analyteKey,
    sessionRule: oneOf(SESSION_RULES, search.get('sessionRule')) ?? 'first',
    direction: oneOf(DIRECTIONS, search.get('direction')) ?? biomarker?.direction ?? 'higher',
  }
}

function oneOf<T extends string>(values: readonly T[], wanted: string | null): T | undefined {
  return values.find((value) => value === wanted)
}

/** The protocol's direction for an analyte, or null where it has none. */
export const plannedDirection = ({ protocol }: Dataset, analyteKey: string): Direction | null =>
  protocol.biomarkers.find((each) => each.analyteKey === analyteKey)?.direction ?? null

export const plannedCutOffOf = (
  { protocol }: Dataset,
  settings: Pick<ExplorerSettings, 'analyteKey' | 'direction'>,
) => plannedCutOff(protocol, settings)
