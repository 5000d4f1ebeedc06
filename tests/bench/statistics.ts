import { execFileSync } from 'node:child_process'
import { cpus } from 'node:os'
import { fileURLToPath } from 'node:url'
import { bootstrapArea } from '#shared/statistics/accuracy/bootstrapArea.ts'
import { bootstrapClusteredArea } from '#shared/statistics/accuracy/bootstrapClusteredArea.ts'
import type { Classes } from '#shared/statistics/accuracy/Classes.ts'
import { delongArea } from '#shared/statistics/accuracy/delongArea.ts'
import { pairedDelong } from '#shared/statistics/accuracy/pairedDelong.ts'
import { rocCurve } from '#shared/statistics/accuracy/rocCurve.ts'
import { passingBablokRegression } from '#shared/statistics/agreement/passingBablokRegression.ts'
import { randomStream } from '#shared/statistics/random/randomStream.ts'
import { allanDeviation } from '#shared/statistics/sensor/allanDeviation.ts'

/**
 * `npm run bench:statistics`: how long the heavy statistics take, beside a native sort of the same
 * numbers as the floor. A line for each figure, and all of them as JSON on the last line.
 */

type Figure = { name: string; n: number; milliseconds: number } & Record<string, number | string>

const figures: Figure[] = []
const random = randomStream(2026)
const normal = () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())

function report(name: string, n: number, milliseconds: number, more: Record<string, number> = {}) {
  figures.push({ name, n, milliseconds, ...more })
  const extras = Object.entries(more).map(([key, value]) => `${key} ${value}`)
  console.log([name, `n = ${n}`, `${milliseconds} ms`, ...extras].join('   '))
}

function rounded(value: number, digits = 2): number {
  return Number(value.toFixed(digits))
}

/** The least disturbed of several runs, after two to warm up; `prepare` is not timed. */
function timed<T>(runs: number, prepare: () => T, run: (prepared: T) => unknown): number {
  let least = Infinity
  // long runs need no warming up
  for (let k = runs < 4 ? 0 : -2; k < runs; k++) {
    const prepared = prepare()
    const start = performance.now()
    run(prepared)
    if (k >= 0) least = Math.min(least, performance.now() - start)
  }
  return rounded(least)
}

function series(n: number, shift: number): Float64Array {
  return Float64Array.from({ length: n }, () => shift + normal())
}

function halfDiseased(n: number): { classes: Classes; all: Float64Array } {
  const all = new Float64Array(n)
  const present = series(n / 2, 1)
  const absent = series(n / 2, 0)
  for (let i = 0; i < n; i++) all[i] = i % 2 === 0 ? present[i >> 1]! : absent[i >> 1]!
  return { classes: { present, absent, direction: 'higher' }, all }
}

function area(): void {
  for (const n of [1e4, 1e5, 1e6]) {
    const { classes, all } = halfDiseased(n)
    const runs = n === 1e6 ? 7 : 15
    const sort = timed(
      runs,
      () => all.slice(),
      (copy) => copy.sort(),
    )
    const roc = timed(
      runs,
      () => classes,
      (given) => delongArea(rocCurve(given)),
    )
    report('native sort', n, sort)
    report('ROC points + area + DeLong interval', n, roc, { timesSort: rounded(roc / sort) })
    if (n !== 1e5) continue
    const second = halfDiseased(n).classes
    const paired = timed(
      runs,
      () => second,
      (given) => pairedDelong(classes, given),
    )
    report('paired comparison of two areas', n, paired, { timesSort: rounded(paired / sort) })
  }
}

function bootstrap(): void {
  for (const n of [1e4, 1e5]) {
    const { classes } = halfDiseased(n)
    const curve = rocCurve(classes)
    // three sessions a subject
    const clustered = {
      ...classes,
      presentSubjects: Array.from(classes.present, (_, i) => Math.floor(i / 3)),
      absentSubjects: Array.from(classes.absent, (_, i) => -1 - Math.floor(i / 3)),
    }
    const runs = n === 1e5 ? 2 : 3
    const resampling = { seed: 1, replicates: 2000 }
    const stratified = timed(
      runs,
      () => curve,
      (given) => bootstrapArea(given, resampling),
    )
    const subjects = timed(
      runs,
      () => clustered,
      (given) => bootstrapClusteredArea(given, resampling),
    )
    const perDraw = (ms: number) => ({ nanosecondsPerSubject: rounded((ms * 1e6) / (2000 * n)) })
    report('bootstrap, stratified, 2,000 replicates', n, stratified, perDraw(stratified))
    report('bootstrap of subjects, 2,000 replicates', n, subjects, perDraw(subjects))
  }
}

/** In a process of its own, so that its memory is its own. */
function passingBablok(): void {
  const self = fileURLToPath(import.meta.url)
  for (const n of [2000, 20_000]) {
    const output = execFileSync(
      process.execPath,
      [...process.execArgv, self, 'passing-bablok', String(n)],
      { encoding: 'utf8' },
    )
    const { milliseconds, peakMb, addedMb } = JSON.parse(output) as Record<string, number>
    report('Passing–Bablok', n, milliseconds!, { peakMb: peakMb!, addedMb: addedMb! })
  }
}

function passingBablokAlone(n: number): void {
  const truth = series(n, 0)
  const x = truth.map((value) => 100 + 30 * value + 5 * normal())
  const y = truth.map((value) => 108 + 31.5 * value + 5 * normal())
  const megabytes = () => rounded(process.resourceUsage().maxRSS / 1024, 0)
  const before = megabytes()
  const start = performance.now()
  passingBablokRegression(x, y)
  const milliseconds = rounded(performance.now() - start)
  const peakMb = megabytes()
  console.log(JSON.stringify({ milliseconds, peakMb, addedMb: peakMb - before }))
}

function allan(): void {
  for (const n of [1e5, 1e6]) {
    const readings = series(n, 0)
    const milliseconds = timed(
      5,
      () => readings,
      (given) => allanDeviation(given),
    )
    report('Allan deviation, overlapping, octaves', n, milliseconds)
  }
}

/** Time over n·log n, the larger n against the smaller: about 1 or less where growth is no worse. */
function growth(): Record<string, number> {
  const grown: Record<string, number> = {}
  for (const name of new Set(figures.map((figure) => figure.name))) {
    const sizes = figures.filter((figure) => figure.name === name)
    const first = sizes[0]!
    const last = sizes.at(-1)!
    if (first.n === last.n) continue
    const scaled = ({ n, milliseconds }: Figure) => milliseconds / (n * Math.log2(n))
    grown[name] = rounded(scaled(last) / scaled(first))
  }
  return grown
}

if (process.argv[2] === 'passing-bablok') passingBablokAlone(Number(process.argv[3]))
else {
  area()
  bootstrap()
  passingBablok()
  allan()
  const machine = `${cpus()[0]?.model ?? 'unknown'}, Node ${process.version}`
  console.log(JSON.stringify({ machine, figures, growthOverNLogN: growth() }))
}
