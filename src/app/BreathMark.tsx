/** The mark: a drop of breath, falling like a comma. Decorative beside words that say the same. */
export function BreathMark({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 16 26" aria-hidden="true" className={className}>
      <path
        d="M8 2c3.6 0 6 2.6 6 6 0 5-3.6 11-9.5 16 2.6-4 3.6-7 3.4-9.6C4.5 14.2 2 11.7 2 8.2 2 4.6 4.6 2 8 2z"
        fill="currentColor"
      />
    </svg>
  )
}
