import type { Exhalation, Flag, FlagCause } from '#shared/breath/TraceResult.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'

export type Reason = { name: string; severity: Flag['severity'] | 'pass'; words: string }
export type Verdict = { kept: boolean; title: string; reasons: Reason[] }

/** Both numbers of a comparison, in as many digits as it takes to tell them apart. */
function apart(value: number, limit: number): [string, string] {
  for (let digits = 3; digits < 12; digits++) {
    const both = [formatConcentration(value, digits), formatConcentration(limit, digits)] as const
    if (both[0] !== both[1] || value === limit) return [...both]
  }
  return [formatConcentration(value, 12), formatConcentration(limit, 12)]
}

/** v is the value and l the limit, both as text; u the unit. */
const SENTENCES: Record<FlagCause, (v: string, l: string, u: string) => string> = {
  'flow-outside': (v, l, u) =>
    `${v} ${u} of the plateau lies outside the target flow; at most ${l} ${u} may`,
  'flow-mean': (v, l, u) => `Mean flow ${v} ${u}; the limit is ${l} ${u}`,
  'pressure-outside': (v, l, u) =>
    `Mouth pressure outside its band for ${v} ${u} on end; at most ${l} ${u}`,
  'too-short': (v, l, u) => `Blown for ${v} ${u}; at least ${l} ${u} needed`,
  short: (v, l, u) => `Blown for ${v} ${u}; ${l} ${u} or longer is better`,
  'co2-low': (v, l, u) => `End-tidal CO2 ${v} ${u}, below ${l} ${u}`,
  'co2-high': (v, l, u) => `End-tidal CO2 ${v} ${u}, above ${l} ${u}`,
  'inspired-co2': (v, l, u) => `CO2 breathed in ${v} ${u}, above ${l} ${u}`,
  'rest-short': (v, l, u) => `Rested for ${v} ${u} before it; ${l} ${u} or longer is better`,
  'phase-three-short': (v, l, u) => `Plateau ${v} ${u} long; at least ${l} ${u} needed`,
  'plateau-slope': (v, l, u) => `Changes by ${v} ${u} over the plateau; at most ${l} ${u}`,
  'near-room-air': (v, l, u) =>
    `Reading ${v} ${u}, near room air or below it: the limit is ${l} ${u}. It is kept`,
  saturated: (v, l, u) => `Reaches ${v} ${u}; the sensor shows at most ${l} ${u}`,
  gap: (v, l, u) => `A gap of ${v} ${u} in the record; at most ${l} ${u}`,
  'cut-off': () => 'The record begins or ends in the middle of it',
  incomplete: () => 'The gas does not fill the plateau',
  'below-detection': (v, l, u) =>
    `Reading ${v} ${u} lies below the limit of detection, ${l} ${u}; kept as measured`,
  'slow-response': (v, l, u) =>
    `The sensor needs ${v} ${u} to rise from 10 to 90 %; at most ${l} ${u} for this length`,
  'check-failed': (v) => `${v} of the sensor's checks failed; none may`,
  'check-old': (v, l, u) => `The sensor was checked ${v} ${u} ago; at most ${l} ${u}`,
}

/** A flag as a sentence with what was found and the limit that it broke. */
export function flagWords({ cause, value, limit, unit }: Flag): string {
  // Long enough, and still the samples at its end do not fill the window.
  if (cause === 'phase-three-short' && value !== null && limit !== null && value >= limit)
    return `The last ${formatConcentration(limit)} ${unit} are not all recorded.`
  const [v, l] = value === null || limit === null ? ['', ''] : apart(value, limit)
  return `${SENTENCES[cause](v, l, unit)}.`
}

/**
 * The verdict on one gas of an exhalation, what decided first, then warnings, then what was in order.
 * @param analyte a gas of the trace; flags of other gases say nothing of it
 */
export function verdictOf(exhalation: Exhalation, analyte: string): Verdict {
  const flags = exhalation.flags.filter((flag) => flag.analyte === null || flag.analyte === analyte)
  const kept = exhalation.readings.some((each) => each.analyte === analyte && each.accepted)
  const said = (severity: Flag['severity']): Reason[] =>
    flags
      .filter((flag) => flag.severity === severity)
      .map((flag) => ({ name: flag.name, severity, words: flagWords(flag) }))
  const warnings = said('warn')
  return {
    kept,
    title: kept ? (warnings.length > 0 ? 'Accepted, with a warning' : 'Accepted') : 'Left out',
    reasons: [...said('reject'), ...warnings, ...passedOf(exhalation, flags)],
  }
}

/** The measures that people look at first, where no flag speaks of them. */
function passedOf(exhalation: Exhalation, flags: readonly Flag[]): Reason[] {
  const { durationS, phaseThreeS, endTidalCo2Percent, meanFlowMlS } = exhalation
  const amount = (value: number) => formatConcentration(value, 3)
  const measures: [Flag['name'][], string][] = [
    [['DUR'], `Blown for ${amount(durationS)} s.`],
    [['PLATEAU_SHORT'], `Plateau ${amount(phaseThreeS)} s long.`],
    [['CO2_LOW', 'CO2_HIGH'], `End-tidal CO2 ${amount(endTidalCo2Percent)} %.`],
  ]
  if (meanFlowMlS !== null && exhalation.window)
    measures.push([['FLOW'], `Mean flow ${amount(meanFlowMlS)} mL/s.`])
  return measures
    .filter(([names]) => !flags.some(({ name }) => names.includes(name)))
    .map(([names, words]) => ({ name: names[0]!, severity: 'pass', words }))
}
