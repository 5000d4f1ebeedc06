/**
 * Normalised noise-equivalent absorption, W·cm⁻¹·Hz^−½: α_min·P/√Δf.
 * @param absorptionPerCm least detectable absorption, cm⁻¹
 * @param opticalPowerW power at the sensor
 * @param bandwidthHz detection bandwidth
 */
export function noiseEquivalentAbsorption(
  absorptionPerCm: number,
  opticalPowerW: number,
  bandwidthHz: number,
): number {
  return (absorptionPerCm * opticalPowerW) / Math.sqrt(bandwidthHz)
}
