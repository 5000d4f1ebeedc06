import { type ReactNode, type RefObject, useEffect, useId, useMemo, useRef, useState } from 'react'
import {
  type DefaultValues,
  type FieldErrors,
  type FieldValues,
  FormProvider,
  type Path,
  useForm,
} from 'react-hook-form'
import type { z } from 'zod'
import { ApiError } from '../api/ApiError.ts'
import { Button } from '../ui/Button.tsx'
import { Notice } from '../ui/Notice.tsx'
import { ErrorSummary, type SummaryEntry } from './ErrorSummary.tsx'
import { FormContext, type FormParts } from './formContext.ts'
import { type FormSchema, formResolver } from './formResolver.ts'
import { useUnsavedWork } from './UnsavedWork.tsx'
import { useChanged } from './useChanged.ts'

type FormProps<S extends FormSchema, Answer> = {
  schema: S
  defaultValues: DefaultValues<z.input<S>>
  /** Throws an ApiError where the server refuses; its fields come back to their places. */
  onSubmit: (values: z.output<S>) => Promise<Answer>
  /** After saving, when nothing holds the page any more: the place to go on from. */
  onSaved?: (answer: Answer) => unknown
  submitLabel: string
  busyLabel?: string
  kind?: 'primary' | 'danger'
  onCancel?: () => void
  cancelLabel?: string
  /** Why nothing can be changed here, as a sentence. */
  locked?: string
  /** Changes when the person has dealt with what the whole form was refused for. */
  dealtWith?: unknown
  /** Opened by a press on this page: the first field takes the focus. */
  takesFocus?: boolean
  /** Asks before unsaved work is left. */
  guard?: boolean
  /** More to press beside the submit button. */
  secondary?: ReactNode
  children: ReactNode
}

type Refusal = { message: string; requestId?: string }

/** The one form: checks by schema, sums errors up, keeps what was typed, says why it is locked. */
export function Form<S extends FormSchema, Answer>(props: FormProps<S, Answer>) {
  const { schema, locked, guard = true, onSubmit, onSaved, dealtWith } = props
  const element = useRef<HTMLFormElement>(null)
  const [parts] = useFormPartsOnce()
  const summary = useRef<HTMLDivElement>(null)
  const [refused, setRefused] = useState(false)
  const wantsFocus = useRef(false)
  const [refusal, setRefusal] = useState<Refusal | null>(null)

  const form = useForm<z.input<S>, unknown, z.output<S>>({
    resolver: useMemo(() => formResolver(schema, parts.numberFields), [schema, parts]),
    defaultValues: props.defaultValues,
    shouldFocusError: false,
  })
  const { errors, isSubmitting } = form.formState
  const [changed, settle] = useChanged(form)
  const letGo = useUnsavedWork(guard && changed && locked === undefined)

  // After every commit: the errors of a refused form arrive one commit later than the refusal.
  useEffect(() => {
    if (!wantsFocus.current || !summary.current) return
    wantsFocus.current = false
    summary.current.focus()
  })
  const [dealtWithBefore, setDealtWithBefore] = useState(dealtWith)
  if (dealtWith !== dealtWithBefore) {
    setDealtWithBefore(dealtWith)
    setRefusal(null)
    setRefused(false)
  }
  useFocusOnOpening(element, props.takesFocus === true)
  const showRefusal = (whole: Refusal | null) => {
    wantsFocus.current = true
    setRefused(true)
    setRefusal(whole)
  }

  const save = form.handleSubmit(
    async (values) => {
      setRefusal(null)
      try {
        const answer = await onSubmit(values)
        form.reset(undefined, { keepValues: true })
        settle()
        letGo()
        onSaved?.(answer)
      } catch (error) {
        for (const [name, message] of Object.entries(fieldsOf(error))) {
          form.setError(name as Path<z.input<S>>, { type: 'server', message })
        }
        showRefusal(refusalOf(error))
      }
    },
    () => showRefusal(null),
  )
  const entries = refused ? entriesOf(errors) : []

  return (
    <FormContext value={parts}>
      <FormProvider {...form}>
        <form ref={element} noValidate onSubmit={(event) => void save(event)}>
          {locked !== undefined && (
            <div className="mb-5">
              <Notice tone="warn" title="Locked">
                {locked}
              </Notice>
            </div>
          )}
          {(entries.length > 0 || refusal) && (
            <ErrorSummary
              ref={summary}
              message={refusal?.message ?? 'Some entries need attention.'}
              requestId={refusal?.requestId}
              entries={entries}
            />
          )}
          <fieldset disabled={locked !== undefined} className="min-w-0">
            <div className="flex flex-col gap-5">{props.children}</div>
            {locked === undefined && (
              <div className="mt-6 flex flex-wrap items-center gap-2.5">
                <Button
                  type="submit"
                  kind={props.kind}
                  busy={isSubmitting && (props.busyLabel ?? 'Saving…')}
                >
                  {props.submitLabel}
                </Button>
                {props.secondary}
                {props.onCancel && (
                  <Button kind="quiet" onClick={props.onCancel}>
                    {props.cancelLabel ?? 'Cancel'}
                  </Button>
                )}
              </div>
            )}
          </fieldset>
        </form>
      </FormProvider>
    </FormContext>
  )
}

/** What was pressed has gone from the page, and the focus with it. */
function useFocusOnOpening(form: RefObject<HTMLFormElement | null>, wanted: boolean) {
  useEffect(() => {
    if (!wanted) return
    const fields = form.current?.querySelectorAll<HTMLInputElement>('input, select, textarea')
    const first = [...(fields ?? [])].find((field) => field.type !== 'radio' || field.checked)
    const target = first ?? fields?.[0]
    target?.focus()
  }, [form, wanted])
}

function useFormPartsOnce() {
  const id = useId()
  return useState<FormParts>(() => ({
    idOf: (name) => `${id}-${name}`,
    labels: new Map(),
    numberFields: new Set(),
  }))
}

function fieldsOf(error: unknown): Record<string, string> {
  return error instanceof ApiError ? (error.fields ?? {}) : {}
}

const LOGIN_ENDED =
  'Your login had ended. Sign in again, then press the button once more: what you entered is still here.'

function refusalOf(error: unknown): Refusal {
  if (error instanceof ApiError && error.code === 'not-signed-in') return { message: LOGIN_ENDED }
  if (error instanceof ApiError)
    // A refusal explains itself; only a fault is for somebody else to look up.
    return {
      message: error.message,
      requestId: error.status >= 500 ? error.requestId : undefined,
    }
  console.error(error)
  return { message: 'Something went wrong in this page. Nothing was saved.' }
}

/** Flattens nested errors to the paths that fields are named by: "analytes.0.unit". */
function entriesOf(errors: FieldErrors<FieldValues>, prefix = ''): SummaryEntry[] {
  return Object.entries(errors).flatMap(([key, error]) => {
    if (!error || typeof error !== 'object' || key === 'ref') return []
    const name = prefix + key
    if (typeof error.message === 'string') return [{ name, message: error.message }]
    return entriesOf(error as FieldErrors<FieldValues>, `${name}.`)
  })
}
