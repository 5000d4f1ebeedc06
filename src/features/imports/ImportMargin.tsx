import { Link } from 'react-router-dom'
import type { DataImport } from '#shared/schemas/import.ts'
import { DELIMITER_LABELS } from '#shared/terms/importColumn.ts'
import { IMPORT_STATE_LABELS } from '#shared/terms/importState.ts'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { formatBytes } from '../../ui/formatBytes.ts'
import { InstantText } from '../../ui/InstantText.tsx'

/** Where the rows come from. */
export function ImportMargin({ studyId, of }: { studyId: string; of: DataImport }) {
  const format = of.mapping?.format
  return (
    <>
      <Facts
        items={[
          { term: 'File', value: formatBytes(of.fileBytes) },
          {
            term: 'Its hash',
            value: <CopyableHash value={of.fileHash} label="hash of the file" />,
          },
          {
            term: 'Uploaded',
            value: (
              <>
                {of.uploadedByName}
                <br />
                <InstantText at={of.createdAt} />
              </>
            ),
          },
          ...(of.enteredAt ? [{ term: 'Entered', value: <InstantText at={of.enteredAt} /> }] : []),
          ...(format
            ? [
                {
                  term: 'Written with',
                  value: `${DELIMITER_LABELS[format.delimiter].toLowerCase()} between cells, decimal ${format.decimal === '.' ? 'point' : 'comma'}`,
                },
              ]
            : []),
          ...(of.sameFile
            ? [
                {
                  term: 'The same file',
                  value: (
                    <Link to={`/studies/${studyId}/imports/${of.sameFile.id}`} className="link">
                      import {of.sameFile.number},{' '}
                      {IMPORT_STATE_LABELS[of.sameFile.state].toLowerCase()}
                    </Link>
                  ),
                },
              ]
            : []),
        ]}
      />
      <p>
        The file’s own name is not kept. No names, dates of birth or hospital numbers come in: the
        key to the codes stays in your site file.
      </p>
    </>
  )
}
