import { type DragEvent, useEffect, useId, useRef, useState } from 'react'
import { Button } from './Button.tsx'
import { classes } from './classes.ts'
import { formatBytes } from './formatBytes.ts'
import { LinkButton } from './LinkButton.tsx'

type FileDropProps = {
  label: string
  hint?: string
  /** With the dot: ".csv" */
  extensions: readonly string[]
  maxBytes: number
  file: File | null
  onFile: (file: File | null) => void
  /** What the server said about the file. */
  error?: string
}

/** Drag a file here or choose one; a file of another kind or too large is refused in words. */
export function FileDrop({
  label,
  hint,
  extensions,
  maxBytes,
  file,
  onFile,
  error,
}: FileDropProps) {
  const id = useId()
  const input = useRef<HTMLInputElement>(null)
  const [over, setOver] = useState(false)
  const [problem, setProblem] = useState<string | null>(null)
  const shownProblem = problem ?? error

  // The button that sent the file may be gone by now; the next step is another file.
  useEffect(() => {
    if (error !== undefined) input.current?.focus()
  }, [error])

  const take = (files: FileList | null) => {
    const found = files === null ? null : problemOf(files, extensions, maxBytes)
    setProblem(found)
    const first = files?.[0]
    if (found === null && first) onFile(first)
    if (input.current) input.current.value = ''
  }
  const drop = (event: DragEvent) => {
    event.preventDefault()
    setOver(false)
    take(event.dataTransfer.files)
  }

  return (
    <div>
      <label htmlFor={id} className="block font-semibold">
        {label}
      </label>
      <p id={`${id}-hint`} className="text-sm text-ink-2">
        {hint && `${hint} `}
        {extensions.join(', ')}, at most {formatBytes(maxBytes)}.
      </p>
      {shownProblem && (
        <p id={`${id}-problem`} role="alert" className="mt-1 text-sm font-semibold text-stop">
          {shownProblem}
        </p>
      )}
      {/* biome-ignore lint/a11y/noStaticElementInteractions: dropping is an extra for the mouse; the input inside does the same by keyboard */}
      <div
        onDragOver={(event) => {
          event.preventDefault()
          setOver(true)
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={classes(
          'mt-2 flex flex-wrap items-center gap-x-4 gap-y-2 rounded border-[1.5px] border-dashed px-5 py-6',
          'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-spruce',
          over ? 'border-spruce bg-spruce-2' : 'border-rule-2 bg-margin',
        )}
      >
        <input
          ref={input}
          id={id}
          type="file"
          accept={extensions.join(',')}
          aria-describedby={classes(`${id}-hint`, shownProblem && `${id}-problem`)}
          aria-invalid={shownProblem ? true : undefined}
          onChange={(event) => take(event.target.files)}
          className="sr-only"
        />
        <Button kind="quiet" tabIndex={-1} aria-hidden onClick={() => input.current?.click()}>
          {file ? 'Choose another file' : 'Choose a file'}
        </Button>
        <span role="status" className="min-w-0">
          {file ? (
            <>
              <strong className="font-semibold break-all">{file.name}</strong>
              <span className="text-ink-2"> {formatBytes(file.size)}</span>
            </>
          ) : (
            <span className="text-ink-2">or drag it here</span>
          )}
        </span>
        {file && (
          <LinkButton
            onClick={() => {
              setProblem(null)
              onFile(null)
            }}
          >
            Take it out
          </LinkButton>
        )}
      </div>
    </div>
  )
}

function problemOf(
  files: FileList,
  extensions: readonly string[],
  maxBytes: number,
): string | null {
  const file = files[0]
  if (files.length > 1) return 'Several files were dropped. Give one file.'
  if (!file) return 'That was not a file. Give a file.'
  if (!extensions.some((extension) => file.name.toLowerCase().endsWith(extension)))
    return `"${file.name}" is of another kind. Give a file that ends in ${extensions.join(' or ')}.`
  if (file.size === 0) return `"${file.name}" is empty.`
  if (file.size > maxBytes)
    return `"${file.name}" has ${formatBytes(file.size)}. At most ${formatBytes(maxBytes)} are taken.`
  return null
}
