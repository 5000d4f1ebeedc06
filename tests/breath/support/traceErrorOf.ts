import { expect } from 'vitest'
import { readTrace } from '#shared/breath/readTrace.ts'
import type { TraceSettings } from '#shared/breath/settings/TraceSettings.ts'
import { TraceError } from '#shared/breath/TraceError.ts'

/** The refusal of a trace; fails where it is read, or where anything else is thrown. */
export async function traceErrorOf(
  source: string | AsyncIterable<Uint8Array>,
  settings?: Partial<TraceSettings>,
): Promise<TraceError> {
  const outcome = await readTrace(source, settings).catch((error: unknown) => error)
  expect(outcome).toBeInstanceOf(TraceError)
  return outcome as TraceError
}
