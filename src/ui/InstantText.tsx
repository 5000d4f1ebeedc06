import { formatDate, formatInstant } from '#shared/terms/numbers.ts'

type InstantTextProps = {
  /** UTC, ISO 8601. */
  at: string
  precision?: 'day' | 'minute' | 'second'
}

/** UTC as everybody in the study sees it; the reader's own time on pointing at it. */
export function InstantText({ at, precision = 'minute' }: InstantTextProps) {
  return (
    <time dateTime={at} title={`${localTime.format(new Date(at))} where you are`}>
      {textOf(at, precision)}
    </time>
  )
}

function textOf(at: string, precision: 'day' | 'minute' | 'second'): string {
  if (precision === 'day') return formatDate(at)
  if (precision === 'minute') return formatInstant(at)
  return `${formatDate(at)} ${new Date(at).toISOString().slice(11, 19)} UTC`
}

const localTime = new Intl.DateTimeFormat('en-GB', {
  dateStyle: 'medium',
  timeStyle: 'long',
})
