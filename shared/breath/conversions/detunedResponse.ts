/**
 * Response of a resonator driven beside its resonance, as a share of that on it:
 * 1/√(1 + (2·Q·Δf/f0)²). Holds close to the resonance.
 */
export function detunedResponse(detuningHz: number, resonanceHz: number, quality: number): number {
  return 1 / Math.hypot(1, (2 * quality * detuningHz) / resonanceHz)
}
