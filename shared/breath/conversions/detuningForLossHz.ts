/**
 * Detuning in Hz at which a resonator's response has lost the given share; the inverse of
 * `detunedResponse`.
 * @param lossPercent above 0, below 100
 */
export function detuningForLossHz(
  lossPercent: number,
  resonanceHz: number,
  quality: number,
): number {
  const response = 1 - lossPercent / 100
  return (resonanceHz * Math.sqrt(1 / response ** 2 - 1)) / (2 * quality)
}
