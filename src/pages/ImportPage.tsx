import { useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect, useRef, useState } from 'react'
import { useParams, useSearchParams } from 'react-router-dom'
import { type DataImport, DELIMITERS } from '#shared/schemas/import.ts'
import { ApiError } from '../api/ApiError.ts'
import { studyKey, useStudy } from '../api/study.ts'
import { analytesQuery } from '../features/analytes/analytes.api.ts'
import { DiscardDialog } from '../features/imports/DiscardDialog.tsx'
import { ImportDone } from '../features/imports/ImportDone.tsx'
import { ImportMargin } from '../features/imports/ImportMargin.tsx'
import { ImportSteps } from '../features/imports/ImportSteps.tsx'
import { ImportWork } from '../features/imports/ImportWork.tsx'
import { importQuery, importReadingQuery } from '../features/imports/imports.api.ts'
import { MappingForm } from '../features/imports/MappingForm.tsx'
import { RowsStep } from '../features/imports/RowsStep.tsx'
import { sitesQuery } from '../features/sites/sites.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { Button } from '../ui/Button.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { Notice } from '../ui/Notice.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'
import { SheetSkeleton } from '../ui/Skeleton.tsx'

/** One file on its way in: its columns, its rows, and what came of them. */
export default function ImportPage() {
  const study = useStudy()
  const { importId = '' } = useParams()
  const found = useQuery(importQuery(study.id, importId))
  useFreshStudy(study.id, found.data)
  const back = { to: `/studies/${study.id}/imports`, label: 'Imports' }
  if (found.data) return <OneImport of={found.data} back={back} />
  const missing = found.error instanceof ApiError && found.error.status === 404
  return (
    <>
      <PageHead title="Import" back={back} />
      {found.error && !missing && (
        <ErrorNotice
          what="The import could not be read"
          error={found.error}
          onRetry={found.refetch}
        />
      )}
      {missing && (
        <EmptyPlace
          title="There is no such import"
          action={<ButtonLink to={back.to}>Go to the imports</ButtonLink>}
        />
      )}
      {found.isPending && <SheetSkeleton />}
    </>
  )
}

/** When work has ended, the counts on the course and the lists have changed. */
function useFreshStudy(studyId: string, found: DataImport | undefined): void {
  const queries = useQueryClient()
  const state = found?.state
  const before = useRef(state)
  useEffect(() => {
    if (before.current !== undefined && before.current !== state && state === 'entered')
      void queries.invalidateQueries({ queryKey: studyKey(studyId) })
    before.current = state
  }, [queries, studyId, state])
}

const OPEN_STATES = ['uploaded', 'previewed', 'failed']

function OneImport({ of, back }: { of: DataImport; back: { to: string; label: string } }) {
  const study = useStudy()
  const [search, setSearch] = useSearchParams()
  const [discarding, setDiscarding] = useState(false)
  const mayDiscard = useMay('import.discard') && OPEN_STATES.includes(of.state)
  const mayReadCodes = useMay('import.readCodes')
  const atColumns =
    of.state === 'uploaded' ||
    of.state === 'failed' ||
    (of.state === 'previewed' && search.get('show') === 'columns')
  return (
    <>
      <PageHead
        title={`Import ${of.number}`}
        sub={subOf(of, atColumns)}
        back={back}
        actions={
          <>
            {mayDiscard && (
              <Button kind="quiet" onClick={() => setDiscarding(true)}>
                Discard the file
              </Button>
            )}
            {of.state === 'previewed' &&
              (atColumns ? (
                <ButtonLink kind="quiet" to="?">
                  Back to the rows
                </ButtonLink>
              ) : (
                <ButtonLink kind="quiet" to="?show=columns">
                  Change the columns
                </ButtonLink>
              ))}
          </>
        }
      />
      <Sheet label="About this import" margin={<ImportMargin studyId={study.id} of={of} />}>
        {of.state !== 'discarded' && <ImportSteps state={of.state} atColumns={atColumns} />}
        <div className="flex flex-col gap-5">
          {of.failure && (
            <Notice tone={of.stopped ? 'plain' : 'stop'} title={failureTitle(of)} announce>
              {of.failure}
            </Notice>
          )}
          {of.sameFile?.state === 'entered' && of.state !== 'entered' && (
            <Notice title={`The same file came in before, as import ${of.sameFile.number}`}>
              Rows that are here already are found again and not entered twice.
            </Notice>
          )}
          {of.work && <ImportWork studyId={study.id} of={of} />}
          {atColumns && <ColumnsStep of={of} onChecking={() => setSearch({}, { replace: true })} />}
          {of.state === 'previewed' && !atColumns && <RowsStepWithTerms of={of} />}
          {of.state === 'entered' && (
            <ImportDone studyId={study.id} of={of} mayReadCodes={mayReadCodes} />
          )}
          {of.state === 'discarded' && (
            <EmptyPlace
              title="This file was discarded"
              action={<ButtonLink to={back.to}>Go to the imports</ButtonLink>}
            >
              Nothing of it is in the study, and nothing of it is kept but its hash.
            </EmptyPlace>
          )}
        </div>
      </Sheet>
      <DiscardDialog
        studyId={study.id}
        of={of}
        open={discarding}
        onClose={() => setDiscarding(false)}
      />
    </>
  )
}

function failureTitle({ state, stopped }: DataImport): string {
  if (stopped) return 'Stopped'
  return state === 'failed' ? 'The rows could not be checked' : 'The rows were not entered'
}

function subOf({ state, counts }: DataImport, atColumns: boolean): string {
  if (atColumns) return 'Say what each column means'
  if (state === 'previewing') return 'Every row is being looked at'
  if (state === 'entering') return 'On its way into the study'
  if (state === 'entered') return 'In the study'
  if (state === 'discarded') return 'Discarded'
  return `${(counts?.rows ?? 0).toLocaleString('en-GB')} rows looked at, nothing written yet`
}

function useLocked(): string | undefined {
  const study = useStudy()
  if (study.lockedAt !== null)
    return 'The data of this study are locked. No file comes in any more.'
  return undefined
}

function ColumnsStep({ of, onChecking }: { of: DataImport; onChecking: () => void }) {
  const study = useStudy()
  const [search, setSearch] = useSearchParams()
  const asked =
    DELIMITERS.find((each) => each === search.get('cells')) ?? of.mapping?.format.delimiter
  const reading = useQuery(importReadingQuery(study.id, of.id, asked))
  const analytes = useQuery(analytesQuery(study.id))
  const sites = useQuery(sitesQuery(study.id))
  const locked = useLocked()
  const error = reading.error ?? analytes.error ?? sites.error
  if (error)
    return (
      <>
        <ErrorNotice what="The columns could not be read" error={error} onRetry={reading.refetch} />
        {asked && (
          <div>
            <ButtonLink kind="quiet" to="?">
              Read it as before
            </ButtonLink>
          </div>
        )}
      </>
    )
  if (!reading.data || !analytes.data || !sites.data) return <SheetSkeleton />
  return (
    <MappingForm
      key={reading.data.delimiter}
      studyId={study.id}
      of={of}
      reading={reading.data}
      analytes={analytes.data}
      sites={sites.data}
      locked={locked}
      onDelimiter={(cells) =>
        setSearch((before) => ({ ...Object.fromEntries(before), cells }), { replace: true })
      }
      onChecking={onChecking}
    />
  )
}

function RowsStepWithTerms({ of }: { of: DataImport }) {
  const study = useStudy()
  const analytes = useQuery(analytesQuery(study.id))
  const sites = useQuery(sitesQuery(study.id))
  const locked = useLocked()
  if (!analytes.data || !sites.data || !of.mapping || !of.counts) return <SheetSkeleton />
  return (
    <RowsStep
      studyId={study.id}
      of={{ ...of, mapping: of.mapping, counts: of.counts }}
      analytes={analytes.data}
      sites={sites.data}
      locked={locked}
    />
  )
}
