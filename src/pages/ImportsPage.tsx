import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import { useStudy } from '../api/study.ts'
import { importColumns } from '../features/imports/importColumns.tsx'
import { importsQuery } from '../features/imports/imports.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { DataTable } from '../ui/DataTable.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Sheet } from '../ui/Sheet.tsx'

/** The files that were brought into a study of earlier data. */
export default function ImportsPage() {
  const study = useStudy()
  const mayList = useMay('import.list')
  const imports = useQuery({ ...importsQuery(study.id), enabled: mayList })
  const mayOpen = useMay('import.read')
  const mayUpload = useMay('import.upload')
  const columns = useMemo(() => importColumns(mayOpen), [mayOpen])
  const bringIn = mayUpload && <ButtonLink to="new">Bring in a file</ButtonLink>
  return (
    <>
      <PageHead
        title="Imports"
        sub="Files of earlier data and what became of them"
        back={{ to: `/studies/${study.id}/subjects`, label: 'Subjects' }}
        actions={imports.data?.length ? bringIn : undefined}
      />
      <Sheet
        label="About these imports"
        margin={
          <>
            <p>
              A file goes through three steps: the columns are named, every row is checked, and what
              is right enters in one step.
            </p>
            <p>
              The name of a file is never kept. After entering, neither is the file: its hash and
              the codes that its lines got stay.
            </p>
            {study.lockedAt !== null && <p>The data are locked: no file comes in any more.</p>}
          </>
        }
      >
        {!mayList ? (
          <EmptyPlace title="Imports are not open to your place in this study">
            The study lead brings files in and can say what became of them.
          </EmptyPlace>
        ) : (
          <DataTable
            caption="Imports"
            hideCaption
            columns={columns}
            rows={imports.data}
            rowId={(row) => row.id}
            status={imports}
            empty={
              <EmptyPlace title="No file has been brought in yet" action={bringIn || undefined}>
                {mayUpload
                  ? 'A CSV with one row a subject or a session: an identifier, what the sensor measured, and the reference.'
                  : 'The study lead brings files in.'}
              </EmptyPlace>
            }
          />
        )}
      </Sheet>
    </>
  )
}
