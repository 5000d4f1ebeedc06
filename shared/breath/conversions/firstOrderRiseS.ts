/** Rise from 10 to 90 % in s of a first-order response with time constant τ: τ·ln 9. */
export function firstOrderRiseS(timeConstantS: number): number {
  return timeConstantS * Math.log(9)
}
