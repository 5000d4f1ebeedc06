import { completeSettings } from '../settings/completeSettings.ts'
import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { TraceColumns } from '../TraceColumns.ts'
import { columnsTaker } from './columnsTaker.ts'
import { forEachBlock } from './forEachBlock.ts'

/**
 * Reads a trace file into its numbers. Memory grows with the numbers alone, not with the file.
 * @throws TraceError at the first thing that cannot be read or is implausible by itself
 */
export async function readColumns(
  source: string | AsyncIterable<Uint8Array>,
  settings?: Partial<TraceSettings>,
): Promise<TraceColumns> {
  const taker = columnsTaker(completeSettings(settings))
  await forEachBlock(source, taker.take, taker.line)
  return taker.finish()
}
