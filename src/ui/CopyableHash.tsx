import { useEffect, useState } from 'react'

const SHOWN_DIGITS = 8
const SAID_FOR_MS = 2_000

/** The start of a hash in groups of four; the button copies all of it. */
export function CopyableHash({ value, label }: { value: string; label: string }) {
  const [said, setSaid] = useState<'copied' | 'failed' | null>(null)
  useEffect(() => {
    if (said === null) return
    const timer = setTimeout(() => setSaid(null), SAID_FOR_MS)
    return () => clearTimeout(timer)
  }, [said])
  const copy = () => {
    navigator.clipboard
      .writeText(value)
      .then(() => setSaid('copied'))
      .catch(() => setSaid('failed'))
  }
  return (
    <span className="inline-flex flex-wrap items-baseline gap-x-2">
      <code className="font-mono print:hidden" title={value}>
        {inGroups(value.slice(0, SHOWN_DIGITS))}
        {value.length > SHOWN_DIGITS && ' …'}
      </code>
      <button
        type="button"
        onClick={copy}
        aria-label={`Copy the whole ${label}`}
        className="min-h-6 text-xs text-spruce underline underline-offset-2 print:hidden"
      >
        {said === null ? 'Copy' : said === 'copied' ? 'Copied' : 'Not copied'}
      </button>
      <span role="status" className="sr-only">
        {said === 'copied' && `The ${label} is on the clipboard.`}
        {said === 'failed' && `The browser did not let the ${label} be copied.`}
      </span>
      <span className="hidden font-mono break-all print:inline">{value}</span>
    </span>
  )
}

function inGroups(digits: string): string {
  return digits.match(/.{1,4}/g)?.join(' ') ?? digits
}
