/** Output of a gas, such as nitric oxide, in pL/s: mixing ratio in ppb times flow in mL/s. */
export function outputPlS(ppb: number, flowMlS: number): number {
  return ppb * flowMlS
}
