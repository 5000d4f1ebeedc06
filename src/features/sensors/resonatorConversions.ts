import { detunedResponse } from '#shared/breath/conversions/detunedResponse.ts'
import { detuningForLossHz } from '#shared/breath/conversions/detuningForLossHz.ts'
import { firstOrderRiseS } from '#shared/breath/conversions/firstOrderRiseS.ts'
import { noiseEquivalentAbsorption } from '#shared/breath/conversions/noiseEquivalentAbsorption.ts'
import { relaxationResponse } from '#shared/breath/conversions/relaxationResponse.ts'
import { resonanceBandwidthHz } from '#shared/breath/conversions/resonanceBandwidthHz.ts'
import { ringDownS } from '#shared/breath/conversions/ringDownS.ts'
import { tuningForkFrequencyHz } from '#shared/breath/conversions/tuningForkFrequencyHz.ts'
import { aboveZero, conversion, plainEntry } from './conversion.ts'

const RESONANCE = aboveZero({ label: 'Resonance', unit: 'Hz', start: '32768' })

export const resonator = conversion({
  key: 'resonator',
  label: 'Resonator',
  note: 'Bandwidth f0/Q; ring-down Q/(π·f0); beside the resonance 1/√(1 + (2·Q·Δf/f0)²).',
  entries: {
    resonance: RESONANCE,
    quality: aboveZero({ label: 'Quality factor Q', start: '10000' }),
    detuning: plainEntry({ label: 'Driven beside it by', unit: 'Hz', start: '0.5' }),
  },
  work: ({ resonance, quality, detuning }) => [
    ['Bandwidth', resonanceBandwidthHz(resonance, quality), 'Hz'],
    ['Ring-down time', 1000 * ringDownS(resonance, quality), 'ms'],
    ['Response left', 100 * detunedResponse(detuning, resonance, quality), '%'],
    ['1 % is lost at', detuningForLossHz(1, resonance, quality), 'Hz'],
  ],
})

export const fork = conversion({
  key: 'fork',
  label: 'Tuning fork',
  note: 'An ideal clamped beam: a check of the order of size, not a prediction.',
  entries: {
    length: aboveZero({ label: 'Length of a prong', unit: 'mm', start: '4' }),
    thickness: aboveZero({ label: 'Thickness along the vibration', unit: 'mm', start: '0.6' }),
    modulus: aboveZero({ label: 'Elastic modulus', unit: 'GPa', start: '78.7' }),
    density: aboveZero({ label: 'Density', unit: 'kg/m³', start: '2649' }),
  },
  work: ({ length, thickness, modulus, density }) => [
    [
      'Resonance',
      tuningForkFrequencyHz({
        lengthMm: length,
        thicknessMm: thickness,
        elasticModulusGpa: modulus,
        densityKgM3: density,
      }),
      'Hz',
    ],
  ],
})

export const relaxation = conversion({
  key: 'relaxation',
  label: 'Slow relaxation',
  note: 'Share of a photoacoustic signal that is left: 1/√(1 + (2π·f·τ)²). Water vapour changes τ: calibrate at breath humidity.',
  entries: {
    resonance: RESONANCE,
    time: aboveZero({ label: 'Relaxation time', unit: 'µs', start: '10' }),
  },
  work: ({ resonance, time }) => [
    ['Signal left', 100 * relaxationResponse(resonance, time * 1e-6), '%'],
  ],
})

export const response = conversion({
  key: 'response',
  label: 'Response time',
  note: 'First order: 10 to 90 % takes τ·ln 9. Measure rise and fall: sticky gases such as ammonia fall more slowly.',
  entries: { time: aboveZero({ label: 'Time constant τ', unit: 's', start: '1' }) },
  work: ({ time }) => [['From 10 to 90 %', firstOrderRiseS(time), 's']],
})

export const absorption = conversion({
  key: 'absorption',
  label: 'Noise-equivalent absorption',
  note: 'α_min·P/√Δf, in W·cm⁻¹·Hz^−½.',
  entries: {
    least: aboveZero({ label: 'Least absorption detected', unit: 'cm⁻¹', start: '1e-6' }),
    power: aboveZero({ label: 'Optical power', unit: 'mW', start: '20' }),
    bandwidth: aboveZero({ label: 'Detection bandwidth', unit: 'Hz', start: '0.25' }),
  },
  work: ({ least, power, bandwidth }) => [
    ['Normalised', noiseEquivalentAbsorption(least, power / 1000, bandwidth), 'W·cm⁻¹·Hz^−½'],
  ],
})
