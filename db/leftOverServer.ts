import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import type { LocalMariaDbPaths } from './localMariaDbFiles.ts'
import { SetUpError } from './SetUpError.ts'

const LONGEST_STOP_MS = 30_000
const launcherFile = (paths: LocalMariaDbPaths) => join(paths.folder, 'launcher.pid')

/** Remembers who started the server of this folder. */
export function rememberLauncher(paths: LocalMariaDbPaths): void {
  writeFileSync(launcherFile(paths), String(process.pid))
}

/**
 * A server of ours that outlived its launcher is stopped, in good order; one whose launcher lives
 * is in use.
 * @throws SetUpError when another Breathmark works in this folder, or the old server does not stop
 */
export async function stopLeftOver(paths: LocalMariaDbPaths): Promise<void> {
  const server = runningServer(paths)
  if (!server) return
  if (server.parent === numberIn(launcherFile(paths)))
    throw new SetUpError(
      `Breathmark is already running from this folder (process ${server.parent}); stop that one first.`,
    )
  await endProcess(() => runningServer(paths)?.pid)
  if (runningServer(paths))
    throw new SetUpError(`An older MariaDB of this folder (process ${server.pid}) does not stop.`)
}

/**
 * Asks in good order, and ends a server that does not listen: one that is told to stop in the
 * middle of its start can hang for ever. InnoDB loses nothing by it.
 */
async function endProcess(pid: () => number | undefined): Promise<void> {
  for (const signal of ['SIGTERM', 'SIGKILL'] as const) {
    const running = pid()
    if (!running) return
    process.kill(running, signal)
    const until = Date.now() + LONGEST_STOP_MS
    while (pid() && Date.now() < until) await wait(50)
  }
}

/** The process that the pid file names, if it is alive and really works on our data. */
function runningServer(paths: LocalMariaDbPaths): { pid: number; parent: number } | undefined {
  const pid = numberIn(paths.pid)
  if (!pid) return undefined
  try {
    const command = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0')
    if (!command.includes(`--datadir=${paths.data}`)) return undefined
    // "pid (name) state parent …": the name may hold spaces and brackets.
    const status = readFileSync(`/proc/${pid}/stat`, 'utf8')
    const parent = Number(status.slice(status.lastIndexOf(')') + 2).split(' ')[1])
    return { pid, parent }
  } catch {
    return undefined
  }
}

function numberIn(file: string): number | undefined {
  try {
    return Number(readFileSync(file, 'utf8').trim()) || undefined
  } catch {
    return undefined
  }
}
