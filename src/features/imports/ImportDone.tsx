import type { DataImport } from '#shared/schemas/import.ts'
import { formatCount } from '#shared/terms/numbers.ts'
import { ButtonLink } from '../../ui/ButtonLink.tsx'
import { Notice } from '../../ui/Notice.tsx'

type ImportDoneProps = { studyId: string; of: DataImport; mayReadCodes: boolean }

/** After entering: what came of it, and the way on. */
export function ImportDone({ studyId, of, mayReadCodes }: ImportDoneProps) {
  const { counts } = of
  const entered = counts?.entered
  const left = counts ? counts.new - (entered?.rows ?? 0) : 0
  return (
    <div className="flex max-w-[80ch] flex-col gap-5">
      <Notice tone="good" title={enteredWords(entered)}>
        {[
          counts && counts.same > 0 && `${rowWords(counts.same)} already here`,
          counts && counts.refused > 0 && `${rowWords(counts.refused)} refused`,
          left > 0 && `${rowWords(left)} left out by choice`,
        ]
          .filter((part) => part)
          .join(', ')}
      </Notice>
      <section>
        <h2>Who is who</h2>
        <p className="mb-3">
          The file and what was read of it have been removed. This list says which line of the file
          became which subject code, and nothing else. Keep it with the key file of your site, where
          the file itself is.
        </p>
        <div className="flex flex-wrap gap-2.5">
          {mayReadCodes && (
            <ButtonLink kind="quiet" href={`/api/imports/${of.id}/codes.csv`}>
              Download lines and codes
            </ButtonLink>
          )}
        </div>
      </section>
      <section>
        <h2>Go on</h2>
        <div className="flex flex-wrap gap-2.5">
          <ButtonLink to={`/studies/${studyId}/subjects`}>See the subjects</ButtonLink>
          <ButtonLink kind="quiet" to={`/studies/${studyId}/lock`}>
            Go to the lock
          </ButtonLink>
        </div>
      </section>
    </div>
  )
}

const rowWords = (rows: number) => (rows === 1 ? '1 row' : `${formatCount(rows)} rows`)

const enteredWords = (entered: { rows: number; subjects: number } | null | undefined) =>
  entered
    ? `${rowWords(entered.rows)} entered, of ${entered.subjects === 1 ? '1 subject' : `${formatCount(entered.subjects)} subjects`}`
    : 'Entered'
