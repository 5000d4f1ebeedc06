const INSTANT =
  /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})(?::(\d{2})(?:\.\d{1,9})?)?(?:Z|[+-](\d{2}):(\d{2}))$/

/** Whether a text is a date and time with its offset that the calendar knows (ISO 8601, extended). */
export function isInstant(text: string): boolean {
  const parts = INSTANT.exec(text)
  if (!parts) return false
  const [year, month, day, hour, minute, second, offsetHour, offsetMinute] = parts
    .slice(1)
    .map((part) => Number(part ?? 0)) as [number, number, number, number, number, ...number[]]
  const date = new Date(Date.UTC(2000, 0, 1))
  date.setUTCFullYear(year, month - 1, day)
  return (
    date.getUTCMonth() === month - 1 &&
    date.getUTCDate() === day &&
    hour < 24 &&
    minute < 60 &&
    second! < 60 &&
    offsetHour! <= 14 &&
    offsetMinute! < 60
  )
}
