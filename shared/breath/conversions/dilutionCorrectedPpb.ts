/** What the correction needs: room air in ppb; CO2 of the samples, of inspired and alveolar air. */
export type Dilution = {
  roomAirPpb: number
  co2Percent: number
  inspiredCo2Percent: number
  alveolarCo2Percent: number
}

/**
 * The alveolar value of a reading diluted with room air:
 * C_amb + (C − C_amb)·(F_A − F_I)/(F − F_I).
 */
export function dilutionCorrectedPpb(ppb: number, dilution: Dilution): number {
  const { roomAirPpb, co2Percent, inspiredCo2Percent, alveolarCo2Percent } = dilution
  return (
    roomAirPpb +
    ((ppb - roomAirPpb) * (alveolarCo2Percent - inspiredCo2Percent)) /
      (co2Percent - inspiredCo2Percent)
  )
}
