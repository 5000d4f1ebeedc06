import type { Flag } from '../TraceResult.ts'
import { co2Flags } from './co2Flags.ts'
import { durationFlag } from './durationFlag.ts'
import { flowFlag } from './flowFlag.ts'
import type { JudgedExhalation } from './JudgedExhalation.ts'
import { pressureFlag } from './pressureFlag.ts'
import { sensorFlag } from './sensorFlag.ts'

/**
 * The flags that concern the exhalation as a whole: CO2_LOW, CO2_HIGH, REBREATHE, FLOW, PRESS, DUR,
 * PLATEAU_SHORT, REST, SENSOR, and RANGE where the record cuts it off.
 */
export function exhalationFlags(judged: JudgedExhalation): Flag[] {
  const flags = co2Flags(judged)
  for (const flag of [
    cutOffFlag(judged),
    flowFlag(judged),
    pressureFlag(judged),
    durationFlag(judged),
    plateauShortFlag(judged),
    restFlag(judged),
    sensorFlag(judged.trace.settings),
  ]) {
    if (flag) flags.push(flag)
  }
  return flags
}

function cutOffFlag({ breath }: JudgedExhalation): Flag | null {
  if (!breath.cutOff) return null
  return {
    name: 'RANGE',
    cause: 'cut-off',
    severity: 'reject',
    analyte: null,
    value: null,
    limit: null,
    unit: 's',
  }
}

/** Phase III does not fill the window; always raised where the exhalation does not. */
function plateauShortFlag({ trace, samples, exhalation }: JudgedExhalation): Flag | null {
  const limit = trace.settings.windowS
  const { phaseThreeS } = exhalation
  if (samples && trace.clock.ticks(phaseThreeS) >= trace.clock.ticks(limit)) return null
  return {
    name: 'PLATEAU_SHORT',
    cause: 'phase-three-short',
    severity: 'reject',
    analyte: null,
    value: phaseThreeS,
    limit,
    unit: 's',
  }
}

function restFlag({ trace, exhalation, endBeforeS }: JudgedExhalation): Flag | null {
  const limit = trace.settings.restS
  if (endBeforeS === null) return null
  const restS = exhalation.startS - endBeforeS
  if (trace.clock.ticks(restS) >= trace.clock.ticks(limit)) return null
  return {
    name: 'REST',
    cause: 'rest-short',
    severity: 'warn',
    analyte: null,
    value: restS,
    limit,
    unit: 's',
  }
}
