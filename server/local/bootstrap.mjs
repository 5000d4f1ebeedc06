// The first program of every command. It imports nothing but Node's own modules, since on a fresh
// clone there is nothing else; it installs what is missing and hands over to the real program.
import { spawn } from 'node:child_process'
import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, rmSync, statfsSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'

const root = resolve(import.meta.dirname, '../..')
const modules = join(root, 'node_modules')
const stampFile = join(modules, '.breathmark-installed')
/** npm packages, database and logs take about 600 MB. */
const NEEDED_BYTES = 1_000_000_000

/** Debian packages and a file by which to see that each is there. */
const DATABASE = [
  ['mariadb-server-core', '/usr/sbin/mariadbd'],
  ['mariadb-client-core', '/usr/bin/my_print_defaults'],
]
const BROWSER = [
  ['chromium', '/usr/bin/chromium'],
  ['poppler-utils', '/usr/bin/pdftotext'],
]

const COMMANDS = {
  start: { packages: DATABASE, program: ['--import', 'tsx', 'server/local/start.ts'] },
  test: {
    packages: [...DATABASE, ...BROWSER],
    program: ['--import', 'tsx', 'server/local/test.ts'],
  },
  production: { packages: [], program: ['--import', 'tsx', 'server/local/production.ts'] },
}

/** Something outside is in the way: said in one sentence. */
class Stop extends Error {}

let current
let stopping = false
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'])
  process.on(signal, () => {
    stopping = true
    current?.kill(signal)
  })
stopWithNpm()

try {
  const command = COMMANDS[process.argv[2]]
  if (!command) throw new Stop(`Say one of: ${Object.keys(COMMANDS).join(', ')}.`)
  checkNode()
  checkDisk()
  await installDebianPackages(command.packages)
  await installNpmPackages()
  process.exitCode = await run(process.execPath, [...command.program, ...process.argv.slice(3)])
} catch (error) {
  if (!stopping) console.error(error instanceof Stop ? error.message : error)
  process.exitCode = 1
}

function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number)
  if (major < 20 || (major === 20 && minor < 19))
    throw new Stop(`Breathmark needs Node 20.19 or newer; this is ${process.versions.node}.`)
}

function checkDisk() {
  const { bavail, bsize } = statfsSync(root)
  if (!existsSync(stampFile) && bavail * bsize < NEEDED_BYTES)
    throw new Stop(`There is too little room on the disk of ${root}: 1 GB is needed.`)
}

async function installDebianPackages(packages) {
  const missing = packages.filter(([, file]) => !existsSync(file)).map(([name]) => name)
  if (missing.length === 0) return
  const install = ['install', '-y', '--no-install-recommends', ...missing]
  const byHand = `apt-get ${install.join(' ')}`
  if (!existsSync('/usr/bin/apt-get'))
    throw new Stop(`Please install what these Debian packages hold: ${missing.join(', ')}.`)
  if (process.getuid() !== 0) throw new Stop(`Please run this first, as root: ${byHand}`)
  const apt = (...words) =>
    run('apt-get', ['-qq', '-o', 'DPkg::Lock::Timeout=300', '-o', 'Dpkg::Use-Pty=0', ...words], {
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
      quiet: true,
    })
  await timed(`Installing Debian packages: ${missing.join(', ')}`, async () => {
    if ((await apt(...install)) === 0) return
    const refreshed = await apt('update')
    if (refreshed !== 0 || (await apt(...install)) !== 0)
      throw new Stop(`The packages could not be installed; this shows why: ${byHand}`)
  })
}

/** `npm ci`, unless the modules stand as this lock file and this Node want them. */
async function installNpmPackages() {
  const lock = readFileSync(join(root, 'package-lock.json'))
  const stamp = `${createHash('sha256').update(lock).digest('hex')} ${process.version}`
  const isThere = () => existsSync(stampFile) && readFileSync(stampFile, 'utf8') === stamp
  if (isThere()) return
  await alone(async () => {
    // The other command may have installed them while this one waited.
    if (isThere()) return
    await timed('Installing npm packages from the lock file', async () => {
      const words = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error']
      const npm = process.env.npm_execpath
      // What npm told its script is not meant for another npm.
      const env = Object.fromEntries(
        Object.entries(process.env).filter(([name]) => !name.startsWith('npm_')),
      )
      const code = npm
        ? await run(process.execPath, [npm, ...words], { env, quiet: true })
        : await run('npm', words, { env, quiet: true })
      if (code !== 0) throw new Stop('The npm packages could not be installed; see above.')
      writeFileSync(stampFile, stamp)
    })
  })
}

/** Holds a folder as a lock, so that two commands do not install into each other's modules. */
async function alone(work) {
  const lock = join(root, '.local', 'installing')
  mkdirSync(join(root, '.local'), { recursive: true, mode: 0o700 })
  while (!taken(lock)) await wait(500)
  try {
    await work()
  } finally {
    rmSync(lock, { recursive: true, force: true })
  }
}

function taken(lock) {
  if (stopping) throw new Stop('Stopped.')
  try {
    mkdirSync(lock)
    writeFileSync(join(lock, 'pid'), String(process.pid))
    return true
  } catch (error) {
    if (error.code !== 'EEXIST') throw error
    const holder = existsSync(join(lock, 'pid')) && readFileSync(join(lock, 'pid'), 'utf8')
    if (holder && !existsSync(`/proc/${holder}`)) rmSync(lock, { recursive: true, force: true })
    return false
  }
}

async function timed(what, work) {
  console.log(`${what} …`)
  const began = Date.now()
  await work()
  console.log(`  done in ${Math.round((Date.now() - began) / 1000)} s`)
}

/**
 * Runs a program to its end and resolves to its exit code. It is told to stop when this one dies.
 * A quiet one shows what it said only when it fails.
 */
function run(program, words, { env = process.env, quiet = false } = {}) {
  if (stopping) throw new Stop('Stopped.')
  const bound = existsSync('/usr/bin/setpriv') ? ['setpriv', '--pdeathsig', 'TERM', '--'] : []
  const [first, ...rest] = [...bound, program, ...words]
  const said = []
  return new Promise((done, fail) => {
    current = spawn(first, rest, {
      cwd: root,
      env,
      stdio: quiet ? ['ignore', 'pipe', 'pipe'] : 'inherit',
    })
    for (const stream of [current.stdout, current.stderr]) stream?.on('data', (b) => said.push(b))
    current.once('error', fail)
    current.once('close', (code) => {
      if (quiet && code !== 0 && !stopping) process.stderr.write(Buffer.concat(said))
      done(code ?? 1)
    })
  })
}

/** When npm is killed it cannot pass the signal on: its disappearance is the signal. */
function stopWithNpm() {
  if (!process.env.npm_lifecycle_event) return
  const npm = process.ppid
  setInterval(() => {
    if (process.ppid === npm) return
    stopping = true
    current?.kill('SIGTERM')
  }, 500).unref()
}
