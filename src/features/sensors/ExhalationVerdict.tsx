import type { Exhalation, Reading } from '#shared/breath/TraceResult.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { classes } from '../../ui/classes.ts'
import { adjustedFact } from './traceSession.ts'
import { type Reason, verdictOf } from './verdictWords.ts'

type ExhalationVerdictProps = { exhalation: Exhalation; reading: Reading }

const SIGNS: Record<Reason['severity'], { sign: string; look: string; spoken: string }> = {
  reject: { sign: '!', look: 'text-stop', spoken: 'Left out because:' },
  warn: { sign: '!', look: 'text-warn', spoken: 'Warning:' },
  pass: { sign: '✓', look: 'text-good', spoken: 'In order:' },
}

/** The verdict in words with the limits that decided, and only then the values. */
export function ExhalationVerdict({ exhalation, reading }: ExhalationVerdictProps) {
  const { kept, title, reasons } = verdictOf(exhalation, reading.analyte)
  return (
    <>
      <p className={classes('text-lg font-bold', kept ? 'text-good' : 'text-stop')}>{title}</p>
      <ul className="mt-1 space-y-1 text-[14px] leading-[1.4]">
        {reasons.map(({ name, severity, words }) => (
          <li key={words} className="flex gap-2">
            <span aria-hidden className={classes('font-bold', SIGNS[severity].look)}>
              {SIGNS[severity].sign}
            </span>
            <span>
              <span className="sr-only">{SIGNS[severity].spoken} </span>
              {unbroken(words)}
              {severity !== 'pass' && <code className="ml-1.5 text-xs text-ink-2">{name}</code>}
            </span>
          </li>
        ))}
      </ul>
      {reading.meanPpb !== null && (
        <p className={classes('mt-2.5 text-2xl leading-tight font-bold', !kept && 'text-ink-2')}>
          {formatConcentration(reading.meanPpb)}{' '}
          <span className="text-[14px] font-normal whitespace-nowrap text-ink-2">
            ppb, plateau mean
          </span>
        </p>
      )}
      <dl className="mt-1 grid grid-cols-[max-content_minmax(0,1fr)] gap-x-3 gap-y-0.5 text-sm">
        {valuesOf(exhalation, reading).map(({ term, value }) => (
          <div key={term} className="contents">
            <dt className="text-ink-2">{term}</dt>
            <dd>{value}</dd>
          </div>
        ))}
      </dl>
    </>
  )
}

function valuesOf({ window, volumeMl, volumeBtpsMl }: Exhalation, reading: Reading) {
  const { sdPpb, changePercent, gradientPpb } = reading
  const amount = (value: number) => formatConcentration(value, 3)
  const fact = (term: string, value: number | null, unit: string) =>
    value === null ? [] : [{ term, value: `${amount(value)} ${unit}` }]
  return [
    ...(window
      ? [{ term: 'Plateau', value: `${amount4(window.startS)} to ${amount4(window.endS)} s` }]
      : []),
    ...fact('SD', sdPpb, 'ppb'),
    ...fact('Change', changePercent, '%'),
    ...(gradientPpb === null
      ? []
      : [{ term: 'Less room air', value: `${amount4(gradientPpb)} ppb` }]),
    ...adjustedFact('At 5 % CO2', reading.co2Normalised),
    ...adjustedFact('Undiluted', reading.dilutionCorrected),
    ...(volumeBtpsMl === null
      ? fact('Volume', volumeMl, 'mL')
      : fact('Volume, BTPS', volumeBtpsMl, 'mL')),
  ]
}

const amount4 = (value: number) => formatConcentration(value, 4)

/** A unit stays with its number at the end of a line. */
const unbroken = (words: string) => words.replaceAll(/(\d) (%|s\b|h\b|ppb|mL)/g, '$1\u00a0$2')
