import type { Conversion } from './conversion.ts'
import {
  carbonDioxide,
  gasOutput,
  humidAndDry,
  massAndMixing,
  permeation,
  pressures,
  volumes,
} from './gasConversions.ts'
import { absorption, fork, relaxation, resonator, response } from './resonatorConversions.ts'

/** What the page of conversions offers, by what it is about. */
export const CONVERSIONS: readonly { label: string; conversions: readonly Conversion[] }[] = [
  {
    label: 'Gas and breath',
    conversions: [
      massAndMixing,
      humidAndDry,
      carbonDioxide,
      gasOutput,
      volumes,
      pressures,
      permeation,
    ],
  },
  { label: 'Sensor', conversions: [resonator, fork, relaxation, response, absorption] },
]
