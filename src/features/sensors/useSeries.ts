import { useState } from 'react'
import { useBeside } from '../../ui/useBeside.ts'
import type { AllanOutcome } from './allanOf.ts'
import { SIGNAL_HINT, suggestedColumn } from './columnHints.ts'
import { delimiterOf, readCsv } from './csvTable.ts'
import type { SeriesOrder } from './series.worker.ts'

type SeriesHead = { file: File; delimiter: string; headings: readonly string[]; column: string }

const startWorker = () =>
  new Worker(new URL('./series.worker.ts', import.meta.url), { type: 'module' })

/** Enough of a file for its line of headings. */
const HEAD_BYTES = 65_536

/** A noise series: its headings are read at once, its readings in a worker. */
export function useSeries() {
  const [head, setHead] = useState<SeriesHead | null>(null)
  const [problem, setProblem] = useState<string | null>(null)
  const onFile = async (file: File | null) => {
    setHead(null)
    setProblem(null)
    if (!file) return
    const text = await file.slice(0, HEAD_BYTES).text()
    const read = readCsv(text)
    if ('problem' in read) return setProblem(read.problem)
    const { headings } = read.table
    const column = suggestedColumn(headings, SIGNAL_HINT, -1)
    setHead({ file, delimiter: delimiterOf(text), headings, column })
  }
  const order: SeriesOrder | null = head && {
    file: head.file,
    delimiter: head.delimiter,
    column: head.column,
  }
  const key = head
    ? [head.file.name, head.file.size, head.file.lastModified, head.column].join(' ')
    : 'none'
  const work = useBeside<SeriesOrder, AllanOutcome>(order, key, startWorker)
  return {
    head,
    problem,
    onFile,
    onColumn: (column: string) => setHead(head && { ...head, column }),
    work: head ? work : null,
  }
}
