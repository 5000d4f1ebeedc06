import { molarVolumeL } from './molarVolumeL.ts'
import { standardPressureKpa } from './standardPressureKpa.ts'

/** A permeation tube in a stream of carrier gas. */
export type Permeation = {
  rateNgMin: number
  molarMassGPerMol: number
  /** Carrier flow at `temperatureC` and `pressureKpa`. */
  flowLMin: number
  temperatureC: number
  pressureKpa?: number
}

/** Mixing ratio in ppb behind a permeation tube: q·V_m/(M·F). Source: ISO 6145-10. */
export function permeationPpb(tube: Permeation): number {
  const { rateNgMin, molarMassGPerMol, flowLMin, temperatureC } = tube
  const volumeL = molarVolumeL(temperatureC, tube.pressureKpa ?? standardPressureKpa)
  return (rateNgMin * volumeL) / (molarMassGPerMol * flowLMin)
}
