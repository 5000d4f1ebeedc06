import { finiteOrNull } from '../ordering/finiteOrNull.ts'
import { percentileOf } from '../ordering/percentileOf.ts'
import { adjustedIf } from '../readings/adjustedIf.ts'
import type { InstrumentData } from '../settings/InstrumentData.ts'
import type { AnalyteSettings, TraceSettings } from '../settings/TraceSettings.ts'
import type { AnalyteSession, Exhalation, Reading } from '../TraceResult.ts'
import { expandedUncertainty } from './expandedUncertainty.ts'
import { firstPair } from './firstPair.ts'
import { spreadOf } from './spreadOf.ts'

type Accepted = { exhalation: number; meanPpb: number; censored: boolean; reading: Reading }

/**
 * A session's value for one gas from the readings that are accepted, in the order of the exhalations
 * (of one trace or of several), by the protocol's rule: the median, of two their mean; or the mean of
 * the first reproducible pair.
 * @param known what is known of the gas: limit of detection, calibration, room air's uncertainty
 */
export function sessionOfAnalyte(
  analyte: string,
  exhalations: readonly Pick<Exhalation, 'number' | 'readings'>[],
  roomAirPpb: number | null,
  known: Partial<AnalyteSettings>,
  settings: TraceSettings,
): AnalyteSession {
  const accepted = acceptedReadings(analyte, exhalations)
  const means = accepted.map(({ meanPpb }) => meanPpb)
  const pair = firstPair(analyte, accepted, settings)
  const used = usedReadings(accepted, pair, settings)
  const over = (figure: (reading: Accepted) => number | null) => medianOver(used, figure)
  const valuePpb = over(({ meanPpb }) => meanPpb)
  const gradientPpb = over(({ reading }) => reading.gradientPpb)
  const spread = spreadOf(means)
  const uncertainty = (roomAirStandardUncertaintyPpb: number) =>
    valuePpb === null || known.calibrationExpandedPercent === undefined
      ? null
      : expandedUncertainty({
          valuePpb,
          n: used.length,
          sdPpb: spreadOf(used.map(({ meanPpb }) => meanPpb)).sd ?? 0,
          calibrationExpandedPercent: known.calibrationExpandedPercent,
          calibrationCoverage: known.calibrationCoverage,
          resolutionPpb: known.resolutionPpb,
          driftPercent: known.driftPercent,
          roomAirStandardUncertaintyPpb,
          coverage: settings.coverage,
        })
  const ofRoomAir = known.roomAirStandardUncertaintyPpb

  return {
    analyte,
    rule: settings.sessionRule,
    valuePpb,
    nAccepted: accepted.length,
    usedExhalations: used.map(({ exhalation }) => exhalation),
    firstPair: pair && [accepted[pair[0]]!.exhalation, accepted[pair[1]]!.exhalation],
    sdPpb: spread.sd,
    cvPercent: spread.cvPercent,
    censored: valuePpb !== null && known.lodPpb !== undefined && valuePpb < known.lodPpb,
    instrument: instrumentOf(known),
    roomAirPpb,
    gradientPpb,
    co2Normalised: adjustedIf(settings.normalise, analyte, settings, () =>
      over(({ reading }) => reading.co2Normalised.ppb),
    ),
    dilutionCorrected: adjustedIf(settings.correctDilution, analyte, settings, () =>
      over(({ reading }) => reading.dilutionCorrected.ppb),
    ),
    uncertainty: uncertainty(0),
    gradientUncertainty:
      gradientPpb === null || ofRoomAir === undefined ? null : uncertainty(ofRoomAir),
  }
}

function instrumentOf(known: Partial<AnalyteSettings>): Partial<InstrumentData> {
  const { transportDelayS, lodPpb, rangeMaxPpb, responseT1090S } = known
  return { transportDelayS, lodPpb, rangeMaxPpb, responseT1090S }
}

function acceptedReadings(
  analyte: string,
  exhalations: readonly Pick<Exhalation, 'number' | 'readings'>[],
): Accepted[] {
  const accepted: Accepted[] = []
  for (const { number, readings } of exhalations) {
    const reading = readings.find((each) => each.analyte === analyte)
    if (!reading?.accepted || reading.meanPpb === null) continue
    const { meanPpb, censored } = reading
    accepted.push({ exhalation: number, meanPpb, censored, reading })
  }
  return accepted
}

function usedReadings(
  accepted: Accepted[],
  pair: [number, number] | null,
  { sessionRule, fewestAccepted }: TraceSettings,
): Accepted[] {
  if (accepted.length < fewestAccepted || accepted.length === 0) return []
  if (sessionRule === 'median') return accepted
  return pair ? [accepted[pair[0]]!, accepted[pair[1]]!] : []
}

/** The median (of two the mean) of a figure that every reading used must have. */
function medianOver(used: Accepted[], figure: (reading: Accepted) => number | null): number | null {
  const values = used.map(figure).filter((value) => value !== null)
  if (values.length === 0 || values.length < used.length) return null
  return finiteOrNull(percentileOf(Float64Array.from(values), values.length, 50))
}
