/** What has to be known about the whole study, on every page of it, on paper too. */
export function Stamps({ texts }: { texts: readonly string[] }) {
  if (texts.length === 0) return null
  return (
    <section
      aria-label="About this study"
      className="border-b border-rule bg-warn-2 px-7 py-1.5 text-sm text-warn-ink max-wide:px-4 print:border print:border-rule-2"
    >
      <ul className="flex flex-wrap gap-x-8 gap-y-0.5">
        {texts.map((text) => (
          <li key={text}>{text}</li>
        ))}
      </ul>
    </section>
  )
}
