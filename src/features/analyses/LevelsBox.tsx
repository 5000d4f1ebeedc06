import { useId, useState } from 'react'
import { readNumber } from '../../forms/readNumber.ts'

type LevelsBoxProps = {
  unit: string
  levels: readonly number[]
  /** Called with every list that can be read. */
  onChange: (levels: number[]) => void
}

const MOST = 6

/** Decision levels, separated by spaces; what cannot be read changes nothing. */
export function LevelsBox({ unit, levels, onChange }: LevelsBoxProps) {
  const id = useId()
  const [text, setText] = useState(levels.join(' '))
  const { problem } = levelsFrom(text)
  const type = (next: string) => {
    setText(next)
    const read = levelsFrom(next)
    if (read.levels) onChange(read.levels)
  }
  return (
    <div>
      <div className="flex flex-wrap items-center gap-x-2.5 gap-y-1">
        <label htmlFor={id} className="text-[14px] font-semibold">
          Bias at decision levels
          <span className="font-normal text-ink-2"> · reference values, with spaces between</span>
        </label>
        <input
          id={id}
          className="control !w-[220px]"
          autoComplete="off"
          value={text}
          aria-invalid={problem ? true : undefined}
          aria-describedby={problem ? `${id}-problem` : undefined}
          onChange={(event) => type(event.target.value)}
        />
        {unit}
      </div>
      {problem && (
        <p id={`${id}-problem`} className="mt-1 text-sm font-semibold text-stop">
          {problem}
        </p>
      )}
    </div>
  )
}

function levelsFrom(text: string): { levels?: number[]; problem?: string } {
  const levels: number[] = []
  for (const part of text.trim().split(/\s+/)) {
    const { value, problem } = readNumber(part)
    if (problem) return { problem: `${part}: ${problem}` }
    if (value !== undefined) levels.push(value)
  }
  return levels.length > MOST ? { problem: `At most ${MOST} levels.` } : { levels }
}
