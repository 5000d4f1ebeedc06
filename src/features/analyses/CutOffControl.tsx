import { useId, useState } from 'react'
import type { ValueAxis } from '#shared/figures/valueAxis.ts'
import { CHOSEN_FROM_DATA } from '#shared/terms/analysis.ts'
import { formatConcentration } from '#shared/terms/numbers.ts'
import { readNumber } from '../../forms/readNumber.ts'
import { Slider } from '../../ui/Slider.tsx'
import type { AccuracyShown } from './accuracyShown.ts'
import { type CutOffChoice, cutOffChoices } from './cutOffChoices.ts'
import { readableCutOff } from './readableCutOff.ts'

type CutOffControlProps = {
  cutOff: number
  onChange: (cutOff: number) => void
  plannedCutOff: number | null
  rules: AccuracyShown['overall']['rules']
  unit: string
  /** What is cut: the analyte. */
  label: string
  hint: string
  axis: ValueAxis
}

/** Moves the cut-off by box, by slider, or to where the protocol or a rule puts it. */
export function CutOffControl(props: CutOffControlProps) {
  const { cutOff, onChange, plannedCutOff, rules, unit, label, hint, axis } = props
  const id = useId()
  // What is being typed, until it is left or the cut-off moves in another way.
  const [typed, setTyped] = useState<{ text: string; cutOff: number } | null>(null)
  const text = typed?.cutOff === cutOff ? typed.text : String(cutOff)
  const { problem } = readNumber(text)
  const type = (next: string) => {
    const { value } = readNumber(next)
    setTyped({ text: next, cutOff: value ?? cutOff })
    if (value !== undefined) onChange(value)
  }
  return (
    <div className="mb-3.5">
      <label htmlFor={id} className="text-[14px] font-semibold">
        {label}
        <span id={`${id}-hint`} className="block text-sm font-normal text-ink-2">
          {hint}
        </span>
      </label>
      <div className="mt-1.5 flex items-center gap-3">
        <input
          id={id}
          className="control !w-[120px] flex-none"
          inputMode="decimal"
          autoComplete="off"
          value={text}
          aria-invalid={problem ? true : undefined}
          aria-describedby={problem ? `${id}-problem ${id}-hint` : `${id}-hint`}
          onChange={(event) => type(event.target.value)}
          onBlur={() => setTyped(null)}
        />
        <span className="flex-none">{unit}</span>
        <Slider
          label={`Cut-off of ${label}`}
          scale={axis.kind}
          min={axis.minimum}
          max={axis.maximum}
          value={cutOff}
          unit={unit}
          format={formatConcentration}
          onChange={(value) => onChange(readableCutOff(value, axis))}
        />
      </div>
      {problem && (
        <p id={`${id}-problem`} className="mt-1 text-sm font-semibold text-stop">
          {problem}
        </p>
      )}
      <div className="mt-2.5 flex flex-wrap items-center gap-2">
        {plannedCutOff !== null && (
          <Choice
            text={`Planned ${formatConcentration(plannedCutOff)}`}
            planned
            chosen={cutOff === plannedCutOff}
            onChoose={() => onChange(plannedCutOff)}
          />
        )}
        <RuleChoices choices={cutOffChoices(rules)} cutOff={cutOff} onChange={onChange} />
      </div>
    </div>
  )
}

function RuleChoices(props: {
  choices: readonly CutOffChoice[]
  cutOff: number
  onChange: (cutOff: number) => void
}) {
  const { choices, cutOff, onChange } = props
  if (choices.length === 0) return null
  return (
    <>
      <span className="text-sm text-ink-2">{CHOSEN_FROM_DATA}:</span>
      {choices.map((choice) => (
        <Choice
          key={choice.key}
          text={choice.text}
          chosen={choice.cutOff === cutOff}
          onChoose={() => onChange(choice.cutOff)}
        />
      ))}
    </>
  )
}

function Choice(props: { text: string; planned?: boolean; chosen: boolean; onChoose: () => void }) {
  const { text, planned = false, chosen, onChoose } = props
  const look = planned ? 'bg-copper-2 text-copper-ink' : 'bg-spruce-2 text-spruce-ink'
  return (
    <button
      type="button"
      aria-pressed={chosen}
      onClick={onChoose}
      className={`min-h-6 rounded-[3px] border px-2 text-[12.5px] hover:border-current ${look} ${chosen ? 'border-current' : 'border-transparent'}`}
    >
      {text}
    </button>
  )
}
