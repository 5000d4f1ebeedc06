import { useState } from 'react'
import { Button } from '../../ui/Button.tsx'

type PlanProtocolProps = { words: string }

/** The plan as a paragraph to put into the protocol; it prints with the page. */
export function PlanProtocol({ words }: PlanProtocolProps) {
  const [copied, setCopied] = useState<string | null>(null)
  const copy = () =>
    navigator.clipboard.writeText(words).then(
      () => setCopied(words),
      () => setCopied(null),
    )
  const [title, ...paragraphs] = words.split('\n')
  return (
    <section className="mt-7 border-t border-rule pt-5" aria-labelledby="plan-protocol">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-2">
        <h2 id="plan-protocol">For the protocol</h2>
        <div className="flex flex-wrap gap-2.5 print:hidden">
          <Button kind="quiet" size="small" onClick={() => void copy()}>
            {copied === words ? 'Copied' : 'Copy the words'}
          </Button>
          <Button kind="quiet" size="small" onClick={() => window.print()}>
            Print this plan
          </Button>
        </div>
      </div>
      <div className="max-w-[80ch] space-y-2">
        <p className="font-semibold">{title}</p>
        {paragraphs.map((paragraph) => (
          <p key={paragraph}>{paragraph}</p>
        ))}
      </div>
    </section>
  )
}
