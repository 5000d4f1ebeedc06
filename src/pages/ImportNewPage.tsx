import { useState } from 'react'
import { Link, useNavigate } from 'react-router-dom'
import { ApiError } from '../api/ApiError.ts'
import { useStudy } from '../api/study.ts'
import { useUploadImport } from '../features/imports/imports.api.ts'
import { useMay } from '../features/studies/useMay.ts'
import { Button } from '../ui/Button.tsx'
import { ButtonLink } from '../ui/ButtonLink.tsx'
import { EmptyPlace } from '../ui/EmptyPlace.tsx'
import { ErrorNotice } from '../ui/ErrorNotice.tsx'
import { FileDrop } from '../ui/FileDrop.tsx'
import { PageHead } from '../ui/PageHead.tsx'
import { Progress } from '../ui/Progress.tsx'
import { Sheet } from '../ui/Sheet.tsx'

const MOST_BYTES = 50_000_000

/** Takes a file in, by choice or by drag. */
export default function ImportNewPage() {
  const study = useStudy()
  const mayUpload = useMay('import.upload')
  return (
    <>
      <PageHead
        title="Bring in a file"
        sub="Earlier data as a CSV, one row a subject or a session"
        back={{ to: `/studies/${study.id}/imports`, label: 'Imports' }}
      />
      <Sheet
        label="About bringing in a file"
        margin={
          <>
            <p>
              Nothing is written to the study until you have named the columns and looked at every
              row’s fate.
            </p>
            <p>
              Take names, dates of birth, hospital numbers, contacts and comments out of the file
              first. Columns that look like such are pointed out and left out.
            </p>
            <p>Values in one column are all in the unit that the study states for the analyte.</p>
          </>
        }
      >
        {mayUpload ? (
          <Upload studyId={study.id} />
        ) : (
          <EmptyPlace
            title={
              study.lockedAt === null
                ? 'Files are brought in by the study lead'
                : 'The data are locked'
            }
            action={<ButtonLink to={`/studies/${study.id}/imports`}>Go to the imports</ButtonLink>}
          />
        )}
      </Sheet>
    </>
  )
}

function Upload({ studyId }: { studyId: string }) {
  const navigate = useNavigate()
  const upload = useUploadImport(studyId)
  const [file, setFile] = useState<File | null>(null)
  const [sent, setSent] = useState(0)
  const refusal = upload.error instanceof ApiError ? upload.error : null
  const atFile = refusal?.fields?.file
  const twin = refusal?.more?.importId

  const send = () => {
    if (!file) return
    setSent(0)
    upload.mutate(
      { file, onProgress: setSent },
      { onSuccess: (made) => navigate(`/studies/${studyId}/imports/${made.id}`) },
    )
  }
  return (
    <div className="flex max-w-3xl flex-col gap-5">
      <FileDrop
        label="Data file"
        hint="Text in UTF-8 with a line of headings; cells parted by commas, semicolons or tabs."
        extensions={['.csv', '.tsv', '.txt']}
        maxBytes={MOST_BYTES}
        file={file}
        onFile={(chosen) => {
          upload.reset()
          setFile(chosen)
        }}
        error={atFile}
      />
      {typeof twin === 'string' && (
        <p>
          <Link to={`/studies/${studyId}/imports/${twin}`} className="link">
            Go on with import {String(refusal?.more?.importNumber)}
          </Link>
        </p>
      )}
      {upload.error && !atFile && (
        <ErrorNotice what="The file was not taken in" error={upload.error} />
      )}
      {upload.isPending ? (
        <Progress
          label={sent < 1 ? 'Sending the file' : 'Reading the headings'}
          fraction={sent < 1 ? sent : undefined}
        />
      ) : (
        <div>
          <Button onClick={send} disabled={!file || atFile !== undefined}>
            Upload and read the headings
          </Button>
        </div>
      )}
    </div>
  )
}
