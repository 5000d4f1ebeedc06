import { btpsFactor } from '#shared/breath/conversions/btpsFactor.ts'
import { dilutionCorrectedPpb } from '#shared/breath/conversions/dilutionCorrectedPpb.ts'
import { dryMixingRatioPpb } from '#shared/breath/conversions/dryMixingRatioPpb.ts'
import { dryPercentOfMmHg } from '#shared/breath/conversions/dryPercentOfMmHg.ts'
import { humidPercentOfMmHg } from '#shared/breath/conversions/humidPercentOfMmHg.ts'
import { kpaOfCmH2o } from '#shared/breath/conversions/kpaOfCmH2o.ts'
import { kpaOfMmHg } from '#shared/breath/conversions/kpaOfMmHg.ts'
import { massConcentrationUgM3 } from '#shared/breath/conversions/massConcentrationUgM3.ts'
import { mixingRatioPpb } from '#shared/breath/conversions/mixingRatioPpb.ts'
import { normalisedToCo2Ppb } from '#shared/breath/conversions/normalisedToCo2Ppb.ts'
import { outputPlS } from '#shared/breath/conversions/outputPlS.ts'
import { permeationPpb } from '#shared/breath/conversions/permeationPpb.ts'
import { saturationPressureKpa } from '#shared/breath/conversions/saturationPressureKpa.ts'
import { stpdFactor } from '#shared/breath/conversions/stpdFactor.ts'
import {
  aboveZero,
  conversion,
  MOLAR_MASS,
  PRESSURE,
  plainEntry,
  TEMPERATURE,
} from './conversion.ts'

const HUMIDITY = {
  label: 'Relative humidity',
  unit: '%',
  start: '100',
  optional: false as const,
  refuse: (value: number) => (value >= 0 && value <= 100 ? null : 'From 0 to 100 %.'),
}

const WATER = 'Water vapour by the WMO formula (6.265 kPa at 37 °C).'

const waterKpa = (temperatureC: number, humidityPercent: number) =>
  (saturationPressureKpa(temperatureC) * humidityPercent) / 100

/** Where water would be all there is, no gas is left to convert. */
const refuseAllWater = (values: { temperature: number; humidity: number; pressure: number }) =>
  waterKpa(values.temperature, values.humidity) < values.pressure
    ? {}
    : { pressure: 'Water vapour alone would have this pressure. Raise it.' }

export const massAndMixing = conversion({
  key: 'mass',
  label: 'ppb and µg/m³',
  note: 'µg/m³ = ppb · M/V, V = R·T/p. Ideal gas; state the temperature with every µg/m³.',
  entries: {
    value: plainEntry({ label: 'Value', start: '1000', hint: 'Read both ways' }),
    molarMass: MOLAR_MASS,
    temperature: TEMPERATURE,
    pressure: PRESSURE,
  },
  work: ({ value, molarMass, temperature, pressure }) => [
    ['If it is ppb', massConcentrationUgM3(value, molarMass, temperature, pressure), 'µg/m³'],
    ['If it is µg/m³', mixingRatioPpb(value, molarMass, temperature, pressure), 'ppb'],
  ],
})

export const humidAndDry = conversion({
  key: 'dry',
  label: 'Humid and dry',
  note: `Dry = humid/(1 − pH2O/p). ${WATER}`,
  entries: {
    value: plainEntry({ label: 'Humid value', unit: 'ppb', start: '500' }),
    temperature: { ...TEMPERATURE, start: '37' },
    humidity: HUMIDITY,
    pressure: PRESSURE,
  },
  refuse: refuseAllWater,
  work: ({ value, temperature, humidity, pressure }) => [
    ['Dry', dryMixingRatioPpb(value, waterKpa(temperature, humidity), pressure), 'ppb'],
    ['Water vapour', waterKpa(temperature, humidity), 'kPa'],
  ],
})

export const volumes = conversion({
  key: 'volume',
  label: 'Volumes at body and standard conditions',
  note: `Body: 37 °C, saturated. Standard: 0 °C, 101.325 kPa, dry. ${WATER}`,
  entries: {
    volume: aboveZero({ label: 'Volume as measured', unit: 'mL', start: '500' }),
    temperature: { ...TEMPERATURE, start: '22' },
    humidity: HUMIDITY,
    pressure: {
      ...PRESSURE,
      refuse: (value: number) => (value > 10 ? null : 'Above 10 kPa, such as 101.325.'),
    },
  },
  refuse: refuseAllWater,
  work: ({ volume, temperature, humidity, pressure }) => {
    const water = waterKpa(temperature, humidity)
    const body = btpsFactor(temperature, water, pressure)
    const standard = stpdFactor(temperature, water, pressure)
    return [
      ['At body conditions', volume * body, 'mL'],
      ['At standard conditions', volume * standard, 'mL'],
      ['Factor, body', body, ''],
      ['Factor, standard', standard, ''],
    ]
  },
})

export const pressures = conversion({
  key: 'pressure',
  label: 'mmHg, cmH2O and kPa',
  note: 'Conventional mmHg and cmH2O. Shares of 760 mmHg; dry with 47 mmHg of water at 37 °C.',
  entries: { value: plainEntry({ label: 'Pressure', start: '40', hint: 'Read both ways' }) },
  work: ({ value }) => [
    ['If it is mmHg', kpaOfMmHg(value), 'kPa'],
    ['…as a share of humid gas', humidPercentOfMmHg(value), '%'],
    ['…as a share of dry gas', dryPercentOfMmHg(value), '%'],
    ['If it is cmH2O', kpaOfCmH2o(value), 'kPa'],
  ],
})

export const carbonDioxide = conversion({
  key: 'co2',
  label: 'Brought to a CO2 content',
  note: 'Normalised: C·F_ref/F. Freed of dilution with room air: C_amb + (C − C_amb)·(F_A − F_I)/(F − F_I). Which gases allow it is the protocol’s matter.',
  entries: {
    value: plainEntry({ label: 'Value', unit: 'ppb', start: '320' }),
    co2: aboveZero({ label: 'CO2 of the same samples', unit: '%', start: '4.2' }),
    alveolar: aboveZero({ label: 'CO2 to bring it to', unit: '%', start: '5' }),
    roomAir: plainEntry({ label: 'Room air', unit: 'ppb', start: '20' }),
    inspired: plainEntry({ label: 'CO2 breathed in', unit: '%', start: '0.04' }),
  },
  refuse: ({ co2, inspired, alveolar }) => ({
    ...(co2 > inspired ? {} : { co2: 'Above the CO2 breathed in.' }),
    ...(alveolar > inspired ? {} : { alveolar: 'Above the CO2 breathed in.' }),
  }),
  work: ({ value, co2, alveolar, roomAir, inspired }) => [
    ['Normalised', normalisedToCo2Ppb(value, co2, alveolar), 'ppb'],
    [
      'Freed of dilution',
      dilutionCorrectedPpb(value, {
        roomAirPpb: roomAir,
        co2Percent: co2,
        inspiredCo2Percent: inspired,
        alveolarCo2Percent: alveolar,
      }),
      'ppb',
    ],
  ],
})

export const gasOutput = conversion({
  key: 'output',
  label: 'Output at a flow',
  note: 'ppb · mL/s = pL/s.',
  entries: {
    value: plainEntry({ label: 'Value', unit: 'ppb', start: '20' }),
    flow: aboveZero({ label: 'Exhaled flow', unit: 'mL/s', start: '50' }),
  },
  work: ({ value, flow }) => [['Output', outputPlS(value, flow), 'pL/s']],
})

export const permeation = conversion({
  key: 'permeation',
  label: 'Permeation tube',
  note: 'ppb = q·V/(M·F). ISO 6145-10.',
  entries: {
    rate: aboveZero({ label: 'Permeation rate', unit: 'ng/min', start: '200' }),
    flow: aboveZero({ label: 'Carrier flow', unit: 'L/min', start: '0.5' }),
    molarMass: MOLAR_MASS,
    temperature: TEMPERATURE,
    pressure: PRESSURE,
  },
  work: ({ rate, flow, molarMass, temperature, pressure }) => [
    [
      'Behind the tube',
      permeationPpb({
        rateNgMin: rate,
        flowLMin: flow,
        molarMassGPerMol: molarMass,
        temperatureC: temperature,
        pressureKpa: pressure,
      }),
      'ppb',
    ],
  ],
})
