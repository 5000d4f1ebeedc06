import { algorithmVersion } from './algorithmVersion.ts'
import { detectBreaths } from './breaths/detectBreaths.ts'
import { flowRunFinder } from './breaths/flowRunFinder.ts'
import { requirePlausible } from './breaths/requirePlausible.ts'
import { roomAirMask } from './breaths/roomAirMask.ts'
import { percentileOf } from './ordering/percentileOf.ts'
import { exhalationOf } from './readings/exhalationOf.ts'
import type { Trace } from './readings/Trace.ts'
import { traceGas } from './readings/traceGas.ts'
import { sessionOfAnalyte } from './session/sessionOfAnalyte.ts'
import { completeSettings } from './settings/completeSettings.ts'
import type { TraceSettings } from './settings/TraceSettings.ts'
import type { TraceColumns } from './TraceColumns.ts'
import type { TraceResult } from './TraceResult.ts'

/**
 * From a trace's numbers to exhalations and session values; the columns are left as they are.
 * @throws TraceError where the numbers cannot be those of breath
 */
export function analyseTrace(columns: TraceColumns, given?: Partial<TraceSettings>): TraceResult {
  const settings = completeSettings(given)
  // One array for everything that has to be put in order: a long trace's numbers are many.
  const scratch = new Float64Array(columns.timeS.length)
  const clock = requirePlausible(columns, scratch, settings)
  const breaths = detectBreaths(columns, clock, settings)
  const isRoomAir = roomAirMask(columns.timeS, breaths, clock, settings.roomAirDistanceS)
  scratch.set(columns.co2Percent)
  const trace: Trace = {
    columns,
    clock,
    settings,
    inspiredCo2Percent: percentileOf(scratch, scratch.length, settings.inspiredPercentile),
    scratch,
    gases: columns.gases.map((gas) => traceGas(gas, columns, clock, isRoomAir, scratch, settings)),
    runHolding: flowRunFinder(columns, clock, settings),
  }
  const exhalations = breaths.map((breath, index) =>
    exhalationOf(trace, breath, index + 1, breaths[index - 1]?.endS ?? null),
  )
  return {
    algorithmVersion,
    recording: columns.recording,
    samples: columns.timeS.length,
    intervalS: clock.intervalS,
    exhalations,
    analytes: trace.gases.map(({ analyte, known, roomAirPpb }) =>
      sessionOfAnalyte(analyte, exhalations, roomAirPpb, known, settings),
    ),
  }
}
