import type { AnalysisRepetition } from '#shared/schemas/analysis.ts'
import { Button } from '../../ui/Button.tsx'
import { ErrorNotice } from '../../ui/ErrorNotice.tsx'
import { InstantText } from '../../ui/InstantText.tsx'
import { Notice } from '../../ui/Notice.tsx'
import { useRepeatAnalysis } from './analyses.api.ts'

/** Runs a stored analysis again and says whether the digits are the same. */
export function RepeatCheck({ analysisId }: { analysisId: string }) {
  const repeat = useRepeatAnalysis(analysisId)
  return (
    <div className="flex flex-col items-start gap-2">
      <Button
        kind="quiet"
        size="small"
        busy={repeat.isPending && 'Running…'}
        onClick={() => repeat.mutate()}
      >
        Run it again
      </Button>
      {repeat.error && <ErrorNotice what="It could not be run again" error={repeat.error} />}
      {repeat.data && <Answer found={repeat.data} />}
    </div>
  )
}

function Answer({ found }: { found: AnalysisRepetition }) {
  if (found.same)
    return (
      <Notice tone="good" title="The same to the last digit" announce>
        Run again <InstantText at={found.repeatedAt} /> with statistics {found.statisticsVersion}.
      </Notice>
    )
  return (
    <Notice tone="warn" title="Not the same digits" announce>
      <p>
        Stored with statistics {found.storedStatisticsVersion}, run again with{' '}
        {found.statisticsVersion}. The stored result stands; these parts differ:
      </p>
      <ul className="mt-1 list-disc pl-4">
        {found.differences.map(({ path, stored, repeated }) => (
          <li key={path} className="break-all">
            <code>{path}</code>: {stored}, now {repeated}
          </li>
        ))}
      </ul>
    </Notice>
  )
}
