const UNITS = ['bytes', 'kB', 'MB', 'GB'] as const

/** Decimal units, as file managers show them: 1500 → "1.5 kB". */
export function formatBytes(bytes: number): string {
  const step = Math.min(UNITS.length - 1, Math.floor(Math.log10(Math.max(bytes, 1)) / 3))
  const value = bytes / 1000 ** step
  const decimals = step > 0 && value < 10 ? 1 : 0
  return `${value.toLocaleString('en-GB', { maximumFractionDigits: decimals })} ${UNITS[step]}`
}
