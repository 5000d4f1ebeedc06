import { percentileOf } from '../ordering/percentileOf.ts'
import { completeSettings } from '../settings/completeSettings.ts'
import type { TraceSettings } from '../settings/TraceSettings.ts'
import type { AnalyteSession, Exhalation, TraceResult } from '../TraceResult.ts'
import { sessionOfAnalyte } from './sessionOfAnalyte.ts'

/**
 * One session from several traces in the order they were recorded: exhalations are numbered on, and the
 * session's values stand on all accepted readings. Each reading keeps the room air of its own trace;
 * the session's is their median.
 */
export function sessionOfTraces(
  traces: readonly Pick<TraceResult, 'exhalations' | 'analytes'>[],
  given?: Partial<TraceSettings>,
): { exhalations: Exhalation[]; analytes: AnalyteSession[] } {
  const settings = completeSettings(given)
  const exhalations = traces
    .flatMap((trace) => trace.exhalations)
    .map((exhalation, index) => ({ ...exhalation, number: index + 1 }))
  const parts = traces.flatMap((trace) => trace.analytes)
  const names = [...new Set(parts.map(({ analyte }) => analyte))]
  const analytes = names.map((analyte) => {
    const own = parts.filter((part) => part.analyte === analyte)
    const roomAirs = own.map(({ roomAirPpb }) => roomAirPpb).filter((ppb) => ppb !== null)
    const roomAirPpb =
      roomAirs.length === 0 ? null : percentileOf(Float64Array.from(roomAirs), roomAirs.length, 50)
    const known = Object.assign(
      {},
      ...own.map(({ instrument }) => instrument),
      Object.hasOwn(settings.analytes, analyte) ? settings.analytes[analyte] : undefined,
    )
    return sessionOfAnalyte(analyte, exhalations, roomAirPpb, known, settings)
  })
  return { exhalations, analytes }
}
