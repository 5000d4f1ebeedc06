const ONE = 'M0 16 6 15 13 6 24 4 33 3 37 16'
const WIDTH = 37
const GAP = 9
const MOST = 3

/** One small exhalation for each breath session. */
export function SessionGlyphs({ count }: { count: number }) {
  if (count === 0) return <span className="text-ink-2">none</span>
  const drawn = Math.min(count, MOST)
  return (
    <span className="inline-flex items-center gap-2">
      <svg
        role="img"
        aria-label={count === 1 ? 'one session' : `${count} sessions`}
        width={drawn * (WIDTH + GAP) - GAP}
        height="19"
        className="overflow-visible"
      >
        {Array.from({ length: drawn }, (_, index) => (
          <path
            // biome-ignore lint/suspicious/noArrayIndexKey: the drawings are alike and never change places
            key={index}
            d={ONE}
            transform={`translate(${index * (WIDTH + GAP)} 1)`}
            fill="none"
            className="stroke-spruce"
            strokeWidth="1.6"
          />
        ))}
      </svg>
      {count > MOST && (
        <span aria-hidden="true" className="text-sm text-ink-2">
          {count}
        </span>
      )}
    </span>
  )
}
