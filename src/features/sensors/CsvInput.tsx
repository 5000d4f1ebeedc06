import { useId, useState } from 'react'
import { FieldMessage } from '../../forms/FieldFrame.tsx'
import { FileDrop } from '../../ui/FileDrop.tsx'
import { LinkButton } from '../../ui/LinkButton.tsx'

type CsvInputProps = {
  label: string
  hint: string
  text: string
  onText: (text: string) => void
  problem: string | null
  /** Numbers to try the page with. */
  invented: string
}

/** Standards and blanks are few lines; a long series is read elsewhere. */
const MOST_BYTES = 1_000_000

/** A small file, dropped or pasted; its lines stay on the page, where they can be mended. */
export function CsvInput({ label, hint, text, onText, problem, invented }: CsvInputProps) {
  const id = useId()
  const [file, setFile] = useState<File | null>(null)
  const take = async (chosen: File | null) => {
    setFile(chosen)
    onText(chosen ? await chosen.text() : '')
  }
  return (
    <div className="space-y-3">
      <FileDrop
        label={label}
        hint={hint}
        extensions={['.csv', '.txt', '.tsv']}
        maxBytes={MOST_BYTES}
        file={file}
        onFile={(chosen) => void take(chosen)}
      />
      <div>
        <label htmlFor={id} className="block text-[14px] font-semibold">
          Its lines
          <span className="font-normal text-ink-2"> · or paste them here</span>
        </label>
        <FieldMessage id={id} message={problem ?? undefined} />
        <textarea
          id={id}
          rows={6}
          spellCheck={false}
          value={text}
          aria-invalid={problem ? true : undefined}
          aria-describedby={problem ? `${id}-error` : undefined}
          onChange={(event) => onText(event.target.value)}
          className="control mt-1.5 font-mono text-sm"
        />
        {text === '' && (
          <LinkButton className="mt-1 text-sm" onClick={() => onText(invented)}>
            Fill in invented numbers
          </LinkButton>
        )}
      </div>
    </div>
  )
}
