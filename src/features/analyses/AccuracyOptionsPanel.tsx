import { type ReactNode, useState } from 'react'
import type { AccuracyOptions } from '#shared/schemas/accuracyMore.ts'
import { USUAL_RESAMPLING } from '#shared/schemas/resampling.ts'
import {
  AREA_INTERVAL_LABELS,
  AREA_INTERVALS,
  SUBGROUPING_LABELS,
  SUBGROUPINGS,
} from '#shared/terms/analysis.ts'
import { Disclosure } from '../../ui/Disclosure.tsx'
import { Segments } from '../../ui/Segments.tsx'
import { NumberBox } from './NumberBox.tsx'

/** What is stored with an accuracy analysis unless somebody chooses otherwise. */
export const USUAL_OPTIONS: AccuracyOptions = {
  areaInterval: 'delong',
  resampling: USUAL_RESAMPLING,
  partialArea: { from: 0.9, to: 1 },
  troubledResults: { zone: null },
  subgroups: [],
  floors: null,
}

const fraction = (value: number) => (value >= 0 && value <= 1 ? null : 'From 0 to 1, such as 0.9.')
const floorOnly = (value: number) =>
  value >= 0 && value < 1 ? null : 'From 0 to below 1, such as 0.8.'
const wholeUpTo = (most: number, least: number) => (value: number) =>
  Number.isInteger(value) && value >= least && value <= most
    ? null
    : `A whole number from ${least} to ${most}.`

type AccuracyOptionsPanelProps = {
  options: AccuracyOptions
  onChange: (changes: Partial<AccuracyOptions>) => void
  unit: string
}

/** What a stored analysis is to hold beyond what is on the screen. */
export function AccuracyOptionsPanel({ options, onChange, unit }: AccuracyOptionsPanelProps) {
  const { areaInterval, partialArea, troubledResults, subgroups } = options
  const floors = options.floors ?? { sensitivity: null, specificity: null, area: null }
  const resampling = options.resampling ?? USUAL_RESAMPLING
  const part = partialArea ?? { from: 0.9, to: 1 }
  return (
    <div className="mt-6 print:hidden">
      <Disclosure summary="What else to store with it">
        <div className="grid gap-x-8 gap-y-5 wide:grid-cols-2">
          <Group title="Interval of the area">
            <Segments
              label="Interval of the area"
              hideLabel
              options={AREA_INTERVALS.map((value) => ({
                value,
                label: AREA_INTERVAL_LABELS[value],
              }))}
              value={areaInterval}
              onChange={(value) => onChange({ areaInterval: value })}
            />
          </Group>
          <Group title="Random samples">
            <NumberBox
              label="Seed"
              value={resampling.seed}
              refuse={wholeUpTo(2_147_483_647, 0)}
              onChange={(seed) =>
                onChange({ resampling: { ...resampling, seed: seed ?? USUAL_RESAMPLING.seed } })
              }
            />
            <NumberBox
              label="Samples"
              value={resampling.replicates}
              refuse={wholeUpTo(20_000, 100)}
              onChange={(replicates) =>
                onChange({
                  resampling: {
                    ...resampling,
                    replicates: replicates ?? USUAL_RESAMPLING.replicates,
                  },
                })
              }
            />
          </Group>
          <Group title="Partial area between specificities">
            <NumberBox
              label="From"
              value={part.from}
              refuse={(value) =>
                fraction(value) ?? (value < part.to ? null : 'Below the other specificity.')
              }
              onChange={(from) => onChange({ partialArea: { ...part, from: from ?? 0.9 } })}
            />
            <NumberBox
              label="To"
              value={part.to}
              refuse={(value) =>
                fraction(value) ?? (value > part.from ? null : 'Above the other specificity.')
              }
              onChange={(to) => onChange({ partialArea: { ...part, to: to ?? 1 } })}
            />
          </Group>
          <ZoneGroup
            zone={troubledResults?.zone ?? null}
            unit={unit}
            onChange={(zone) => onChange({ troubledResults: { zone } })}
          />
          <Group title="Floors for success" hint="Blank where none is set">
            {(['sensitivity', 'specificity', 'area'] as const).map((measure) => (
              <NumberBox
                key={measure}
                label={measure.charAt(0).toUpperCase() + measure.slice(1)}
                value={floors[measure]}
                refuse={floorOnly}
                onChange={(value) => {
                  const next = { ...floors, [measure]: value }
                  const isSet = Object.values(next).some((each) => each !== null)
                  onChange({ floors: isSet ? next : null })
                }}
              />
            ))}
          </Group>
          <Group title="Subgroups">
            {SUBGROUPINGS.map((by) => (
              <label key={by} className="flex min-h-10 items-center gap-2.5">
                <input
                  type="checkbox"
                  className="tick"
                  checked={subgroups.includes(by)}
                  onChange={(event) =>
                    onChange({
                      subgroups: SUBGROUPINGS.filter((each) =>
                        each === by ? event.target.checked : subgroups.includes(each),
                      ),
                    })
                  }
                />
                {SUBGROUPING_LABELS[by]}
              </label>
            ))}
          </Group>
        </div>
      </Disclosure>
    </div>
  )
}

type Zone = { lower: number; upper: number } | null
type ZoneGroupProps = { zone: Zone; unit: string; onChange: (zone: Zone) => void }

/** Both ends make a zone; one alone makes none yet. */
function ZoneGroup({ zone, unit, onChange }: ZoneGroupProps) {
  const [ends, setEnds] = useState<{ lower: number | null; upper: number | null }>(
    zone ?? { lower: null, upper: null },
  )
  const { lower, upper } = ends
  const change = (next: typeof ends) => {
    setEnds(next)
    const isZone = next.lower !== null && next.upper !== null && next.lower < next.upper
    onChange(isZone ? { lower: next.lower!, upper: next.upper! } : null)
  }
  const words =
    lower === null && upper === null
      ? 'No result counts as indeterminate'
      : zone
        ? 'Both ends included'
        : 'Two ends, the second above the first'
  return (
    <Group title="Indeterminate sensor results" hint={words}>
      <NumberBox
        label="From"
        unit={unit}
        value={lower}
        onChange={(value) => change({ ...ends, lower: value })}
      />
      <NumberBox
        label="To"
        unit={unit}
        value={upper}
        onChange={(value) => change({ ...ends, upper: value })}
      />
    </Group>
  )
}

function Group(props: { title: string; hint?: string; children: ReactNode }) {
  return (
    <fieldset className="min-w-0">
      <legend className="text-[14px] font-semibold">
        {props.title}
        {props.hint && <span className="font-normal text-ink-2"> · {props.hint}</span>}
      </legend>
      <div className="mt-1.5 flex flex-wrap items-center gap-x-5 gap-y-2">{props.children}</div>
    </fieldset>
  )
}
