import { spawn } from 'node:child_process'
import { createWriteStream } from 'node:fs'
import { join } from 'node:path'
import { SetUpError } from '#db/SetUpError.ts'

export type Child = {
  name: string
  /** What the program said when it was ready. */
  said: unknown
  /** Settles when the program has ended, whoever ended it. */
  ended: Promise<void>
  stop: () => Promise<void>
}

const LONGEST_STOP_MS = 15_000
const root = join(import.meta.dirname, '../..')

/** A program in TypeScript, run as it stands. */
export const typescript = (file: string): string[] => ['--import', 'tsx', file]

export type ChildOptions = {
  name: string
  /** For node, run from the root of the checkout. */
  arguments: string[]
  env: Record<string, string>
  logFolder: string
  /** Stops the program, ready or not. */
  signal?: AbortSignal
  /** A line that the program wrote to its error output. */
  onError?: (line: string) => unknown
}

/**
 * Starts a Node program and waits for the message by which it says that it is ready. Its output
 * goes to a log. It stops when this process dies.
 * @throws SetUpError when it ends before it is ready
 */
export async function startChild(options: ChildOptions): Promise<Child> {
  const { child, ended, fault } = launch(options)
  const said = await new Promise<unknown>((resolve, reject) => {
    child.once('message', resolve)
    child.once('exit', () =>
      reject(new SetUpError(`The ${options.name} ended at once: ${fault()}`)),
    )
  })
  return {
    name: options.name,
    said,
    ended,
    stop: async () => {
      child.kill('SIGTERM')
      const late = setTimeout(() => child.kill('SIGKILL'), LONGEST_STOP_MS)
      await ended
      clearTimeout(late)
    },
  }
}

/** Runs a Node program to its end. @throws SetUpError when it does not end well */
export async function finishChild(options: ChildOptions): Promise<void> {
  const { child, ended, fault } = launch(options)
  await ended
  if (child.exitCode !== 0) throw new SetUpError(`The ${options.name} failed: ${fault()}`)
}

function launch({ name, arguments: words, env, logFolder, signal, onError }: ChildOptions) {
  const child = spawn('setpriv', ['--pdeathsig', 'TERM', '--', process.execPath, ...words], {
    cwd: root,
    env: { ...inherited(), ...env },
    // A group of its own: Ctrl-C reaches the launcher alone, which stops things in order.
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
  })
  const stop = () => child.kill('SIGTERM')
  signal?.addEventListener('abort', stop)
  const logFile = join(logFolder, `${name.replaceAll(' ', '-')}.log`)
  const log = createWriteStream(logFile)
  let lastError = ''
  child.stdout!.pipe(log, { end: false })
  child.stderr!.pipe(log, { end: false })
  child.stderr!.on('data', (bytes: Buffer) => {
    const lines = bytes.toString().split('\n').filter(Boolean)
    lastError = lines.find((line) => /error/i.test(line)) ?? lastError
    for (const line of lines) onError?.(line)
  })
  const ended = new Promise<void>((resolve) =>
    child.once('close', () => {
      signal?.removeEventListener('abort', stop)
      log.end(resolve)
    }),
  )
  return { child, ended, fault: () => lastError || `see ${logFile}` }
}

/** What npm and the test runners put into the environment is not for the programs of the product. */
function inherited(): NodeJS.ProcessEnv {
  const foreign = /^(npm_|BREATHMARK_|VITEST|PLAYWRIGHT|TEST_|NODE_OPTIONS|NODE_ENV|FORCE_COLOR)/
  return Object.fromEntries(Object.entries(process.env).filter(([name]) => !foreign.test(name)))
}
