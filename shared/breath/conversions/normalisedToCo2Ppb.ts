/**
 * A reading brought to a reference CO2 content: C·reference/F. Which gases allow it is the
 * protocol's matter; hydrogen needs constant ventilation as well.
 * @param co2Percent CO2 of the same samples
 */
export function normalisedToCo2Ppb(
  ppb: number,
  co2Percent: number,
  referenceCo2Percent = 5,
): number {
  return (ppb * referenceCo2Percent) / co2Percent
}
