/**
 * Share of a photoacoustic signal that slow vibrational relaxation leaves: 1/√(1 + (2π·f·τ)²).
 * @param relaxationS time constant τ
 */
export function relaxationResponse(frequencyHz: number, relaxationS: number): number {
  return 1 / Math.hypot(1, 2 * Math.PI * frequencyHz * relaxationS)
}
