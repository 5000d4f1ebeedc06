import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, onTestFinished, test } from 'vitest'
import { portIsFree } from '#db/ports.ts'
import type { LocalPorts } from '#server/local/localPorts.ts'
import { isAlive } from '../support/stackIsAlive.ts'
import { temporaryFolder } from './temporaryFolder.ts'

const root = join(import.meta.dirname, '../..')
const PARTS = 6

/** Starts the whole product with the client from its sources, as `npm start` does. */
async function launch(folder: string) {
  const launcher = spawn(
    process.execPath,
    ['--import', 'tsx', 'tests/support/stackLauncher.ts', folder],
    { cwd: root, stdio: ['ignore', 'pipe', 'pipe', 'ipc'] },
  )
  onTestFinished(() => void launcher.kill('SIGTERM'))
  let output = ''
  for (const stream of [launcher.stdout!, launcher.stderr!])
    stream.on('data', (bytes) => {
      output += bytes
    })
  const ended = once(launcher, 'exit')
  const said = await Promise.race([
    once(launcher, 'message').then(([message]) => message),
    ended.then(() => Promise.reject(new Error(output))),
  ])
  const { publicUrl, ports } = said as { publicUrl: string; ports: LocalPorts }
  const task = `/proc/${launcher.pid}/task/${launcher.pid}/children`
  const children = readFileSync(task, 'utf8').trim().split(' ').map(Number)
  const busyPorts = async () => {
    const free = await Promise.all(Object.values(ports).map(portIsFree))
    return free.filter((isFree) => !isFree).length
  }
  return { launcher, ended, publicUrl, children, busyPorts, output: () => output }
}

test('everything starts, answers, and is gone after one signal', async () => {
  const stack = await launch(temporaryFolder())
  expect(await stack.busyPorts()).toBe(PARTS)
  expect((await fetch(stack.publicUrl)).status).toBe(200)
  // The client's server passes questions on to the API, which knows nobody yet.
  expect((await fetch(`${stack.publicUrl}/api/me`)).status).toBe(401)

  stack.launcher.kill('SIGTERM')
  expect(await stack.ended).toEqual([0, null])
  expect(await stack.busyPorts()).toBe(0)
  expect(stack.children.filter(isAlive)).toEqual([])
})

test('a killed launcher leaves no process, and the next start works on the same data', async () => {
  const folder = temporaryFolder()
  const first = await launch(folder)
  first.launcher.kill('SIGKILL')
  await first.ended
  await expect.poll(() => first.children.filter(isAlive), { timeout: 20_000 }).toEqual([])

  const second = await launch(folder)
  expect((await fetch(`${second.publicUrl}/api/me`)).status).toBe(401)
  second.launcher.kill('SIGTERM')
  expect(await second.ended).toEqual([0, null])
})

test('when a part dies the launcher says which, in one sentence, and stops the others', async () => {
  const stack = await launch(temporaryFolder())
  const api = stack.children.find((pid) =>
    readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('server/main.ts'),
  )!
  process.kill(api, 'SIGKILL')
  expect(await stack.ended).toEqual([1, null])
  expect(stack.output()).toMatch(/^The API ended; see .*logs\.$/m)
  expect(await stack.busyPorts()).toBe(0)
})
