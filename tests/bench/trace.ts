/**
 * Reads a day of breathing, 1,000,000 rows of 8 columns, with papaparse alone (stream, step, no numbers
 * made) and with readTrace, each in a process of its own, turn about, bundled
 * as the server is. Prints seconds and peak memory;
 * the last line is JSON. Memory is what a process needs at its peak; the numbers that readTrace keeps
 * are 8 bytes times rows times columns.
 */
import { execFileSync } from 'node:child_process'
import { once } from 'node:events'
import { createReadStream, createWriteStream, mkdtempSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { finished } from 'node:stream/promises'
import Papa from 'papaparse'
import { readTrace } from '#shared/breath/readTrace.ts'

const ROWS = 1_000_000
const COLUMNS = 8
const ROUNDS = 5
const KEPT_MB = (ROWS * COLUMNS * 8) / 1e6
const RATIO_LIMIT = 2
const MEMORY_LIMIT_MB = 120

type Measured = { seconds: number; cpuSeconds: number; peakMb: number; rows: number }

const [mode, file] = process.argv.slice(2)
if (mode && file) {
  const started = performance.now()
  const rows = mode === 'papaparse' ? await countWithPapaparse(file) : await countWithUs(file)
  const seconds = (performance.now() - started) / 1000
  const { user, system } = process.cpuUsage()
  const cpuSeconds = (user + system) / 1e6
  const peakMb = (process.resourceUsage().maxRSS * 1024) / 1e6
  console.log(JSON.stringify({ seconds, cpuSeconds, peakMb, rows } satisfies Measured))
} else {
  await compare()
}

function countWithPapaparse(path: string): Promise<number> {
  return new Promise((resolve, reject) => {
    let rows = 0
    Papa.parse<string[]>(createReadStream(path), {
      step: () => {
        rows++
      },
      complete: () => resolve(rows),
      error: reject,
    })
  })
}

async function countWithUs(path: string): Promise<number> {
  return (await readTrace(createReadStream(path))).samples
}

async function compare(): Promise<void> {
  const folder = mkdtempSync(join(tmpdir(), 'breathmark-bench-'))
  try {
    const path = join(folder, 'trace.csv')
    await writeTrace(path)
    console.log(`${ROWS} rows of ${COLUMNS} columns, ${(statSync(path).size / 1e6).toFixed(1)} MB`)
    const program = join(folder, 'trace.mjs')
    await bundle(program)
    const theirs: Measured[] = []
    const ours: Measured[] = []
    for (let round = 0; round < ROUNDS; round++) {
      theirs.push(measure(program, 'papaparse', path))
      ours.push(measure(program, 'readTrace', path))
    }
    if (ours.some(({ rows }) => rows !== ROWS)) throw new Error('readTrace did not read every row.')
    report(theirs, ours)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/** esbuild is loaded only here: the measured processes live in a folder without packages. */
async function bundle(program: string): Promise<void> {
  const { build } = await import('esbuild')
  await build({
    entryPoints: [import.meta.filename],
    outfile: program,
    bundle: true,
    platform: 'node',
    format: 'esm',
    external: ['esbuild'],
    banner: {
      js: "import { createRequire } from 'node:module'; const require = createRequire('/');",
    },
  })
}

function measure(program: string, what: string, path: string): Measured {
  const out = execFileSync(process.execPath, [program, what, path], { encoding: 'utf8' })
  return JSON.parse(out) as Measured
}

function report(theirs: Measured[], ours: Measured[]): void {
  const median = (values: number[]) => [...values].sort((a, b) => a - b)[values.length >> 1]!
  const papaparseS = median(theirs.map(({ seconds }) => seconds))
  const readTraceS = median(ours.map(({ seconds }) => seconds))
  const papaparseCpuS = median(theirs.map(({ cpuSeconds }) => cpuSeconds))
  const readTraceCpuS = median(ours.map(({ cpuSeconds }) => cpuSeconds))
  const papaparsePeakMb = median(theirs.map(({ peakMb }) => peakMb))
  const peakMb = Math.max(...ours.map((one) => one.peakMb))
  const ratio = readTraceS / papaparseS
  const beyondNumbersMb = peakMb - KEPT_MB
  const holds = ratio <= RATIO_LIMIT && beyondNumbersMb <= MEMORY_LIMIT_MB
  console.log(
    `papaparse alone  ${papaparseS.toFixed(2)} s (processor ${papaparseCpuS.toFixed(2)} s), peak ${papaparsePeakMb.toFixed(0)} MB`,
  )
  console.log(
    `readTrace        ${readTraceS.toFixed(2)} s (processor ${readTraceCpuS.toFixed(2)} s), peak ${peakMb.toFixed(0)} MB`,
  )
  console.log(`ratio ${ratio.toFixed(2)} (at most ${RATIO_LIMIT})`)
  console.log(
    `beyond the ${KEPT_MB} MB of numbers ${beyondNumbersMb.toFixed(0)} MB (at most ${MEMORY_LIMIT_MB} MB)`,
  )
  console.log(JSON.stringify({ papaparseS, readTraceS, ratio, peakMb, beyondNumbersMb, holds }))
  process.exitCode = holds ? 0 : 1
}

/** Six seconds out, four in, all day long; numbers as instruments print them. */
async function writeTrace(path: string): Promise<void> {
  const out = createWriteStream(path)
  out.write(
    'time_s,co2_percent,flow_ml_s,pressure_cmh2o,temperature_c,humidity_percent,acetone_ppb,isoprene_ppb\n',
  )
  for (let i = 0; i < ROWS; i++) {
    const t = i / 10
    const s = t % 10
    const isOut = s < 6
    const rise = isOut ? 1 - Math.exp(-s / 0.5) : 0
    const line = [
      t.toFixed(1),
      (0.04 + 4.8 * rise + 0.001 * (i % 7)).toFixed(4),
      (isOut ? 50 + 0.1 * (i % 11) : -75).toFixed(2),
      (isOut ? 10 + 0.01 * (i % 13) : 0).toFixed(3),
      (24 + 0.0001 * (i % 17)).toFixed(4),
      (48 + 0.01 * (i % 19)).toFixed(2),
      (20 + 480 * rise + 0.1 * (i % 23)).toFixed(4),
      (3 + 100 * rise + 0.1 * (i % 29)).toFixed(4),
    ].join(',')
    if (!out.write(`${line}\n`)) await once(out, 'drain')
  }
  out.end()
  await finished(out)
}
