import { type ReactNode, useId } from 'react'
import type { Dataset } from '#shared/schemas/dataset.ts'
import { SESSION_RULE_LABELS, SESSION_RULES, type SessionRule } from '#shared/terms/analysis.ts'
import { DIRECTION_LABELS, DIRECTIONS, type Direction } from '#shared/terms/protocol.ts'
import { type ExplorerSettings, plannedDirection } from './explorerSettings.ts'

type ExplorerToolbarProps = {
  dataset: Dataset
  settings: ExplorerSettings
  onChange: (changes: Partial<ExplorerSettings>) => void
  /** Subjects with several sessions: where there are none the rule changes nothing. */
  severalSessions: number
}

/** Which analyte, in which direction, and which value of a subject with several sessions. */
export function ExplorerToolbar(props: ExplorerToolbarProps) {
  const { dataset, settings, onChange, severalSessions } = props
  const withReference = settings.kind === 'agreement' || settings.kind === 'correlation'
  const planned = plannedDirection(dataset, settings.analyteKey)
  return (
    <div className="mb-5 grid gap-x-5 gap-y-3 border-b border-rule pb-5 tablet:grid-cols-[repeat(auto-fill,minmax(250px,1fr))]">
      <Choice label="Analyte">
        {(id) => (
          <select
            id={id}
            className="control"
            value={settings.analyteKey}
            onChange={(event) =>
              onChange({
                analyteKey: event.target.value,
                referenceKey: event.target.value,
                direction: plannedDirection(dataset, event.target.value) ?? 'higher',
              })
            }
          >
            {dataset.manifest.analytes.map((analyte) => (
              <option key={analyte.key} value={analyte.key}>
                {analyte.name}
              </option>
            ))}
          </select>
        )}
      </Choice>
      {settings.kind === 'accuracy' && (
        <Choice
          label="Direction"
          hint={
            planned === null
              ? 'The protocol plans none'
              : planned === settings.direction
                ? 'As the protocol plans it'
                : 'Not as the protocol plans it'
          }
        >
          {(id) => (
            <select
              id={id}
              className="control"
              value={settings.direction}
              onChange={(event) => onChange({ direction: event.target.value as Direction })}
            >
              {DIRECTIONS.map((direction) => (
                <option key={direction} value={direction}>
                  {DIRECTION_LABELS[direction]}
                </option>
              ))}
            </select>
          )}
        </Choice>
      )}
      {withReference && dataset.manifest.analytes.length > 1 && (
        <Choice
          label="Reference values of"
          hint={
            settings.referenceKey === settings.analyteKey ? 'The same analyte' : 'Another analyte'
          }
        >
          {(id) => (
            <select
              id={id}
              className="control"
              value={settings.referenceKey}
              onChange={(event) => onChange({ referenceKey: event.target.value })}
            >
              {dataset.manifest.analytes.map((analyte) => (
                <option key={analyte.key} value={analyte.key}>
                  {analyte.name}
                </option>
              ))}
            </select>
          )}
        </Choice>
      )}
      {severalSessions > 0 && (
        <Choice label="Several sessions of a subject">
          {(id) => (
            <select
              id={id}
              className="control"
              value={settings.sessionRule}
              onChange={(event) => onChange({ sessionRule: event.target.value as SessionRule })}
            >
              {SESSION_RULES.map((rule) => (
                <option key={rule} value={rule}>
                  {SESSION_RULE_LABELS[rule]}
                </option>
              ))}
            </select>
          )}
        </Choice>
      )}
    </div>
  )
}

function Choice(props: { label: string; hint?: string; children: (id: string) => ReactNode }) {
  const id = useId()
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="block text-[14px] font-semibold">
        {props.label}
        {props.hint && <span className="font-normal text-ink-2"> · {props.hint}</span>}
      </label>
      <div className="mt-1">{props.children(id)}</div>
    </div>
  )
}
