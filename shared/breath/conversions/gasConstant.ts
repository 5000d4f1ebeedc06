/** Molar gas constant, J/(mol·K). Source: CODATA 2018 (exact in the SI of 2019). */
export const gasConstant = 8.314462618
