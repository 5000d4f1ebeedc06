type SliderProps = {
  /** Spoken, not shown: the box beside the slider carries the visible label. */
  label: string
  value: number
  min: number
  max: number
  /** `log` gives every doubling the same way to go; min must be above 0. */
  scale?: 'log' | 'linear'
  unit: string
  format?: (value: number) => string
  onChange: (value: number) => void
  disabled?: boolean
}

/** How finely the way from min to max is divided. */
const STEPS = 1_000

/** A native range input on the scale that the figure beside it uses. */
export function Slider({
  label,
  value,
  min,
  max,
  scale = 'linear',
  unit,
  format = String,
  onChange,
  disabled,
}: SliderProps) {
  return (
    <input
      type="range"
      min={0}
      max={STEPS}
      step={1}
      value={toStep(value, min, max, scale)}
      disabled={disabled}
      onChange={(event) => onChange(fromStep(event.target.valueAsNumber, min, max, scale))}
      aria-label={scale === 'log' ? `${label}, log scale` : label}
      aria-valuetext={`${format(value)} ${unit}`}
      className="h-10 w-full min-w-0 flex-1 accent-copper"
    />
  )
}

function toStep(value: number, min: number, max: number, scale: 'log' | 'linear'): number {
  const inside = Math.min(max, Math.max(min, value))
  const share =
    scale === 'log' ? Math.log(inside / min) / Math.log(max / min) : (inside - min) / (max - min)
  return Math.round(share * STEPS)
}

function fromStep(step: number, min: number, max: number, scale: 'log' | 'linear'): number {
  const share = step / STEPS
  if (share === 0) return min
  if (share === 1) return max
  return scale === 'log' ? min * (max / min) ** share : min + share * (max - min)
}
