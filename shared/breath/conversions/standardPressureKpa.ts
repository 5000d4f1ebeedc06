/** Standard atmosphere, kPa (exact by definition). */
export const standardPressureKpa = 101.325
