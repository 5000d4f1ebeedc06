/**
 * Saturation pressure of water vapour over water, kPa: 0.6112·exp(17.62·t/(243.12 + t)).
 * 6.26531 kPa at 37 °C; the 6.28 of many tables needs Sonntag's or Wagner and Pruss's equation.
 * Source: WMO Guide to Instruments and Methods of Observation (CIMO Guide, WMO-No. 8), Magnus form.
 */
export function saturationPressureKpa(temperatureC: number): number {
  return 0.6112 * Math.exp((17.62 * temperatureC) / (243.12 + temperatureC))
}
