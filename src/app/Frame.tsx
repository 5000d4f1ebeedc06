import type { ReactNode } from 'react'

type FrameProps = {
  band: ReactNode
  course?: ReactNode
  /** Stamps of the study: unblinded, demonstration. */
  stamps?: ReactNode
  children: ReactNode
}

/** Band, course, stamps and the page's main part, with the way past the navigation. */
export function Frame({ band, course, stamps, children }: FrameProps) {
  return (
    <>
      <a
        href="#main"
        className="absolute top-2 left-2 z-50 -translate-y-20 rounded bg-sheet px-4 py-2 font-semibold text-spruce focus:translate-y-0 print:hidden"
      >
        Go to the page
      </a>
      {band}
      {course}
      {stamps}
      <main
        id="main"
        tabIndex={-1}
        className="mx-auto mt-6 mb-10 max-w-[1360px] px-7 outline-none max-wide:mt-4 max-wide:px-4 print:m-0 print:p-0"
      >
        {children}
      </main>
    </>
  )
}
