/** Thermodynamic temperature in K of a temperature in °C. */
export function kelvin(temperatureC: number): number {
  return temperatureC + 273.15
}
