import { EntryField } from './EntryField.tsx'
import type { Entries, EntryProblems } from './entries.ts'

type EntryGridProps = {
  entries: Entries
  /** Which of them, in this order. */
  names: readonly string[]
  texts: Readonly<Record<string, string>>
  problems: EntryProblems | null
  onText: (name: string, text: string) => void
}

/** Boxes for numbers, two beside each other where there is room. */
export function EntryGrid({ entries, names, texts, problems, onText }: EntryGridProps) {
  return (
    <div className="grid grid-cols-[repeat(auto-fit,minmax(min(100%,12.5rem),1fr))] items-end gap-x-6 gap-y-4">
      {names.map((name) => (
        <EntryField
          key={name}
          entry={entries[name]!}
          text={texts[name] ?? entries[name]!.start}
          problem={problems?.[name]}
          onText={(text) => onText(name, text)}
        />
      ))}
    </div>
  )
}
