/** Time in s in which a free oscillation's amplitude falls to 1/e: Q/(π·f0). */
export function ringDownS(resonanceHz: number, quality: number): number {
  return quality / (Math.PI * resonanceHz)
}
