import { useEffect, useRef } from 'react'
import { Link } from 'react-router-dom'
import { classes } from '../ui/classes.ts'
import { BreathMark } from './BreathMark.tsx'
import { COURSE_HEIGHT_PX, COURSE_WIDTH, courseCurve } from './courseCurve.ts'

export type Station = {
  key: string
  label: string
  /** The station's live count, in words: "214 of 240". */
  count: string
  to: string
}

type CourseProps = {
  stations: readonly Station[]
  /** The key of the station that the page belongs to. */
  current: string | null
  /** The last station of the exhalation; the curve falls after it. */
  endsAt?: string
}

/** The study's stations on one exhalation; on a narrow screen a strip that scrolls. */
export function Course({ stations, current, endsAt }: CourseProps) {
  const list = useRef<HTMLOListElement>(null)
  useEffect(() => {
    const strip = list.current
    const station = strip?.querySelector<HTMLElement>(`[data-station="${current}"]`)
    if (!strip || !station) return
    strip.scrollLeft = station.offsetLeft - (strip.clientWidth - station.clientWidth) / 2
  }, [current])

  const endIndex = stations.findIndex((station) => station.key === endsAt)
  const { path, markYs } = courseCurve(
    stations.length,
    endIndex < 0 ? stations.length - 1 : endIndex,
  )
  return (
    <nav
      aria-label="Study course"
      className="relative border-b border-rule bg-sheet print:hidden wide:h-[98px] wide:px-7 wide:pt-3"
    >
      <svg
        viewBox={`0 0 ${COURSE_WIDTH} ${COURSE_HEIGHT_PX}`}
        preserveAspectRatio="none"
        aria-hidden="true"
        className="absolute inset-x-7 top-3 h-[30px] w-[calc(100%-56px)] overflow-visible max-wide:hidden"
      >
        <path
          d={path}
          fill="none"
          className="stroke-rule-2"
          strokeWidth="1.6"
          vectorEffect="non-scaling-stroke"
        />
      </svg>
      <ol
        ref={list}
        className="relative flex max-wide:overflow-x-auto max-wide:px-4 max-wide:pt-2 max-wide:pb-2"
      >
        {stations.map((station, index) => (
          <li
            key={station.key}
            data-station={station.key}
            className={classes(
              'relative text-center text-[13.5px] leading-[1.5] max-wide:flex-none max-wide:border-b-[3px] max-wide:px-3.5 wide:flex-1 wide:pt-[43px]',
              station.key === current ? 'border-copper' : 'border-rule',
            )}
          >
            <Mark y={markYs[index] ?? 0} current={station.key === current} />
            <StationLink station={station} current={station.key === current} />
          </li>
        ))}
      </ol>
    </nav>
  )
}

function Mark({ y, current }: { y: number; current: boolean }) {
  if (current) {
    return (
      <span
        aria-hidden="true"
        className="absolute left-1/2 -ml-[10px] text-copper max-wide:hidden"
        style={{ top: y - 10 }}
      >
        <BreathMark className="h-8 w-5" />
      </span>
    )
  }
  return (
    <span
      aria-hidden="true"
      className="absolute left-1/2 -mt-[5px] -ml-[5px] size-2.5 rounded-full border-[1.6px] border-rule-2 bg-sheet max-wide:hidden"
      style={{ top: y }}
    />
  )
}

function StationLink({ station, current }: { station: Station; current: boolean }) {
  const inside = (
    <>
      {station.label}
      <span className={classes('block text-xs leading-[1.2]', !current && 'text-ink-2')}>
        {station.count}
      </span>
    </>
  )
  return (
    <Link
      to={station.to}
      aria-current={current ? 'page' : undefined}
      className={classes(
        'block rounded-[3px] py-0.5 no-underline hover:text-spruce',
        current ? 'font-semibold text-copper' : 'text-ink',
      )}
    >
      {inside}
    </Link>
  )
}
