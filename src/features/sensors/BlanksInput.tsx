import { ChoiceField } from './ChoiceField.tsx'
import { CsvInput } from './CsvInput.tsx'
import { RefusedLines } from './RefusedLines.tsx'
import { INVENTED_BLANKS } from './sampleTexts.ts'
import type { BlanksWork } from './useBlanks.ts'

/** Readings of blanks and low samples: the file, its columns, and the words that tell them apart. */
export function BlanksInput({ work }: { work: BlanksWork }) {
  const { given, onGiven, blanks, problem } = work
  return (
    <div className="space-y-4 print:hidden">
      <CsvInput
        label="Readings of blanks and low samples"
        hint="One line for each reading, with a word or level that tells blank from low, and the signal."
        text={given.text}
        onText={(text) => onGiven({ ...given, text })}
        problem={given.text === '' ? null : problem}
        invented={INVENTED_BLANKS}
      />
      {blanks && (
        <>
          <div className="grid grid-cols-[repeat(auto-fit,minmax(min(100%,11rem),1fr))] gap-4">
            <ChoiceField
              label="Column that tells them apart"
              value={blanks.kindColumn}
              options={blanks.table.headings}
              onChange={(kindColumn) =>
                onGiven({ ...given, kindColumn, blankKind: null, lowKind: null })
              }
            />
            <ChoiceField
              label="Column of the signal"
              value={blanks.signalColumn}
              options={blanks.table.headings}
              onChange={(signalColumn) => onGiven({ ...given, signalColumn })}
            />
            <ChoiceField
              label="Blank is"
              value={blanks.blankKind}
              options={blanks.kinds}
              onChange={(blankKind) => onGiven({ ...given, blankKind })}
            />
            <ChoiceField
              label="Low is"
              value={blanks.lowKind}
              options={blanks.kinds}
              onChange={(lowKind) => onGiven({ ...given, lowKind })}
            />
          </div>
          <RefusedLines refused={blanks.refused} consequence="These lines are left out." />
        </>
      )}
    </div>
  )
}
