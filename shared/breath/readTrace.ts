import { analyseTrace } from './analyseTrace.ts'
import { readColumns } from './file/readColumns.ts'
import type { TraceSettings } from './settings/TraceSettings.ts'
import type { TraceResult } from './TraceResult.ts'

/**
 * A trace file's exhalations, their verdicts and the session's values.
 * @param source the file's text, or its bytes in chunks cut anywhere
 * @param settings the protocol's thresholds; `defaultSettings` where missing
 * @throws TraceError with line, column and reason where the file cannot be read; RangeError where a
 * setting is no sound number
 */
export async function readTrace(
  source: string | AsyncIterable<Uint8Array>,
  settings?: Partial<TraceSettings>,
): Promise<TraceResult> {
  return analyseTrace(await readColumns(source, settings), settings)
}
