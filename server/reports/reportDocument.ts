import type { ReactElement } from 'react'

/**
 * A report as its author thinks of it; how it looks is decided here and nowhere else. Text may hold
 * any sign: those that Noto Sans lacks are set in another font. Everything but a figure that is still
 * an element can be posted to another thread (see `drawFigures`).
 */
export interface ReportDocument {
  title: string
  subtitle?: string
  /** Stands on every page. */
  header: ReportHeader
  /** Stands on every page, from `shared/terms`. */
  caution: ReportCaution
  /** SHA-256 of the dataset in hexadecimal; stands whole on every page. */
  datasetHash: string
  /** Beside the text of the first page: dataset, who was counted, when it ran, and so on. */
  provenance: readonly ReportPair[]
  /** UTC instant of the report. It is the file's date, so that the same report gives the same bytes. */
  createdAt: string
  sections: readonly ReportSection[]
}

export interface ReportHeader {
  /** Study code, or code and title. */
  study: string
  /** "Open part" or "Closed part". */
  part?: string
  /** "Unblinded: earlier data". */
  stamp?: string
}

export interface ReportCaution {
  heading: string
  text: string
}

export interface ReportPair {
  label: string
  value: string
}

export interface ReportSection {
  heading: string
  /** Begins on a page of its own. */
  newPage?: boolean
  blocks: readonly ReportBlock[]
}

export type ReportBlock =
  | { kind: 'paragraph'; text: string; quiet?: boolean }
  | { kind: 'subheading'; text: string }
  | { kind: 'keyValues'; pairs: readonly ReportPair[] }
  | ReportTable
  | ReportFigure
  | ({ kind: 'caution' } & ReportCaution)

export interface ReportTable {
  kind: 'table'
  caption?: string
  columns: readonly { label: string; align?: 'left' | 'right' }[]
  /** One text for each column. */
  rows: readonly (readonly string[])[]
}

export interface ReportFigure {
  kind: 'figure'
  /** A figure of `shared/figures`, or its SVG. */
  figure: ReactElement | string
  caption: string
  /** Share of the text's width, at most 1. Defaults to 1. */
  share?: number
}
