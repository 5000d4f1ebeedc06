/** Width in Hz of a resonance between its half-power points: f0/Q. */
export function resonanceBandwidthHz(resonanceHz: number, quality: number): number {
  return resonanceHz / quality
}
