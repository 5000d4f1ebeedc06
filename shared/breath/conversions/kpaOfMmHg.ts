/** A pressure in kPa of millimetres of mercury (conventional, 0.133322368 kPa each). */
export function kpaOfMmHg(mmHg: number): number {
  return mmHg * 0.133322368
}
