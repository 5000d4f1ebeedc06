import type { Breath } from '../breaths/Breath.ts'
import type { Samples } from '../readings/plateauWindow.ts'
import type { Trace } from '../readings/Trace.ts'
import type { Exhalation } from '../TraceResult.ts'

/** What the flags of an exhalation and of its readings are judged on; its own flags and verdict are not there yet. */
export type JudgedExhalation = {
  trace: Trace
  breath: Breath
  /** The plateau window's samples; null where the exhalation does not fill it. */
  samples: Samples | null
  endBeforeS: number | null
  /** Longest step in time within the exhalation and at its edges. */
  longestStepS: number
  exhalation: Exhalation
}
