/** A pressure in kPa of centimetres of water (conventional, 0.0980665 kPa each). */
export function kpaOfCmH2o(cmH2o: number): number {
  return cmH2o * 0.0980665
}
