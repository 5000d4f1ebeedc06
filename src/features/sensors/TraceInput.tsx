import { useId } from 'react'
import { FileDrop } from '../../ui/FileDrop.tsx'
import { LinkButton } from '../../ui/LinkButton.tsx'
import { inventedTrace } from './inventedTrace.ts'

type TraceInputProps = {
  file: File | null
  text: string
  onFile: (file: File | null) => void
  onText: (text: string) => void
}

/** A day of breathing; the file never stands in memory as text. */
const MOST_BYTES = 200_000_000

/** A trace file, or its pasted lines. */
export function TraceInput({ file, text, onFile, onText }: TraceInputProps) {
  const id = useId()
  return (
    <div className="min-w-0 space-y-3 print:hidden">
      <FileDrop
        label="Breath trace"
        hint="Under a heading: time_s, co2_percent, a gas such as isoprene_ppb; flow_ml_s and pressure_cmh2o if recorded."
        extensions={['.csv', '.txt']}
        maxBytes={MOST_BYTES}
        file={file}
        onFile={onFile}
      />
      {!file && (
        <div>
          <label htmlFor={id} className="block text-[14px] font-semibold">
            Its lines
            <span className="font-normal text-ink-2"> · or paste them here</span>
          </label>
          <textarea
            id={id}
            rows={5}
            spellCheck={false}
            value={text}
            onChange={(event) => onText(event.target.value)}
            className="control mt-1.5 font-mono text-sm"
          />
          {text === '' && (
            <LinkButton className="mt-1 text-sm" onClick={() => onText(inventedTrace())}>
              Fill in an invented trace
            </LinkButton>
          )}
        </div>
      )}
    </div>
  )
}
