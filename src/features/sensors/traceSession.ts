import { defaultSettings } from '#shared/breath/settings/defaultSettings.ts'
import type { Adjusted, AnalyteSession } from '#shared/breath/TraceResult.ts'
import { formatConcentration, formatCount } from '#shared/terms/numbers.ts'

const { fewestAccepted, agreePercent, agreePpb, agreePpbBelow, agreePpbGases } = defaultSettings

/** Far below what any sensor can tell apart. */
const ROUNDING_PERCENT = 1e-9

const ppb = (value: number) => `${formatConcentration(value)} ppb`

/** What the session's value stands on, or what is still needed for one. */
export function sessionSentence(session: AnalyteSession): string {
  const { analyte, rule, valuePpb, nAccepted, usedExhalations } = session
  const accepted = `${formatCount(nAccepted)} accepted`
  if (valuePpb !== null) {
    const used = usedExhalations.map(formatCount)
    const which =
      used.length > 6 ? `${formatCount(used.length)} exhalations` : `exhalations ${listed(used)}`
    const how = rule === 'pair' ? 'Mean of the first two that agree' : medianOf(used.length)
    return `${how}: ${which}; ${accepted}.`
  }
  const needed = formatCount(fewestAccepted)
  if (rule === 'median' || nAccepted < fewestAccepted)
    return `No value yet: ${needed} accepted exhalations are needed; ${accepted} so far.`
  const absolute = agreePpbGases.includes(analyte)
    ? ` (below ${agreePpbBelow} ppb: within ${agreePpb} ppb)`
    : ''
  return `No value yet: two that agree within ${agreePercent} %${absolute} are needed; ${accepted} so far, and no two of them agree.`
}

const medianOf = (count: number) => (count === 2 ? 'Median of two, which is their mean' : 'Median')

function listed(words: readonly string[]): string {
  return words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`
}

/** The session of one gas in terms and numbers with their units. */
export function sessionFacts(session: AnalyteSession): { term: string; value: string }[] {
  const { uncertainty, gradientPpb, roomAirPpb, firstPair } = session
  // Equal readings differ by the rounding of their means alone.
  const isEqual = session.cvPercent !== null && session.cvPercent < ROUNDING_PERCENT
  const sdPpb = isEqual ? 0 : session.sdPpb
  const cvPercent = isEqual ? 0 : session.cvPercent
  return [
    { term: 'Exhalations accepted', value: formatCount(session.nAccepted) },
    { term: 'SD of the accepted', value: sdPpb === null ? 'needs two' : ppb(sdPpb) },
    {
      term: 'CV of the accepted',
      value: cvPercent === null ? 'needs two' : `${formatConcentration(cvPercent, 3)} %`,
    },
    {
      term: 'First two that agree',
      value: firstPair ? listed(firstPair.map(formatCount)) : 'none yet',
    },
    {
      term: 'Expanded uncertainty',
      value: uncertainty
        ? `± ${formatConcentration(uncertainty.expandedPpb, 3)} ppb (k = ${formatConcentration(uncertainty.coverage)})`
        : session.valuePpb === null
          ? 'needs a value'
          : "needs the calibration's uncertainty",
    },
    { term: 'Room air', value: roomAirPpb === null ? 'not in the trace' : ppb(roomAirPpb) },
    {
      term: 'Value less room air',
      value: gradientPpb === null ? 'needs a value and room air' : ppb(gradientPpb),
    },
    ...adjustedFact('At 5 % CO2', session.co2Normalised),
    ...adjustedFact('Corrected for dilution', session.dilutionCorrected),
    ...(session.censored
      ? [{ term: 'Limit of detection', value: 'the value lies below it; kept as measured' }]
      : []),
  ]
}

/** Nothing where nobody asked. */
export function adjustedFact(term: string, adjusted: Adjusted): { term: string; value: string }[] {
  if (adjusted.why === null) return [{ term, value: ppb(adjusted.ppb) }]
  if (adjusted.why === 'not-asked') return []
  const never = 'never for this gas: CO2 says nothing of its dilution'
  return [{ term, value: adjusted.why === 'never-for-this-gas' ? never : 'cannot be worked out' }]
}
