import { formatDate } from './numbers.ts'

const OFFSET = /^([+-])(\d{2}):(\d{2})$/
const MINUTE_MS = 60_000

/**
 * An instant as the clock of a place showed it: "14 Oct 2026 13:52 +02:00". Null where the offset is
 * not known.
 * @param utcIso UTC, ISO 8601
 * @param offset from UTC, such as +02:00
 */
export function formatLocalInstant(utcIso: string, offset: string | null): string | null {
  const match = OFFSET.exec(offset ?? '')
  if (!match) return null
  const [, sign, hours, minutes] = match
  const shiftMinutes = (Number(hours) * 60 + Number(minutes)) * (sign === '-' ? -1 : 1)
  const clock = new Date(Date.parse(utcIso) + shiftMinutes * MINUTE_MS).toISOString()
  return `${formatDate(clock)} ${clock.slice(11, 16)} ${offset}`
}
