import { createHash, randomBytes } from 'node:crypto'
import { chmodSync, existsSync, mkdirSync, readFileSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { SetUpError } from './SetUpError.ts'

export type LocalMariaDbPaths = {
  folder: string
  config: string
  data: string
  socket: string
  pid: string
  log: string
  accounts: string
  firstStatements: string
}

/** Longest path of a Unix socket on Linux: sun_path has 108 bytes, one of them the closing zero. */
const LONGEST_SOCKET_PATH = 107

/** Where the files of one private server lie; makes its folders, which nobody else may read. */
export function localMariaDbPaths(folder: string): LocalMariaDbPaths {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  chmodSync(folder, 0o700)
  return {
    folder,
    config: join(folder, 'my.cnf'),
    data: join(folder, 'data'),
    socket: socketPath(folder),
    pid: join(folder, 'mariadbd.pid'),
    log: join(folder, 'mariadbd.log'),
    accounts: join(folder, 'accounts.json'),
    firstStatements: join(folder, 'accounts.sql'),
  }
}

/** Beside the data where the path is short enough, else in a private folder of the system's own. */
function socketPath(folder: string): string {
  const near = join(folder, 'mariadbd.sock')
  if (Buffer.byteLength(near) <= LONGEST_SOCKET_PATH) return near
  const digest = createHash('sha256').update(folder).digest('hex').slice(0, 16)
  const elsewhere = join(tmpdir(), `breathmark-${digest}`)
  mkdirSync(elsewhere, { recursive: true, mode: 0o700 })
  const { uid, mode } = statSync(elsewhere)
  if (uid !== process.getuid?.() || (mode & 0o077) !== 0)
    throw new SetUpError(
      `The folder ${elsewhere} belongs to somebody else; remove it and try again.`,
    )
  return join(elsewhere, 'mariadbd.sock')
}

/**
 * The server's settings. What a study needs is said here and not left to a default: every commit
 * reaches the disk, bad values are refused, instants are UTC.
 * @param forTests a throw-away server: a commit reaches the operating system but does not wait for
 *   the disk, so that a killed server loses nothing and the tests are quick; only a power cut could
 *   lose what nobody wants to keep.
 */
export function writeConfig(paths: LocalMariaDbPaths, forTests: boolean): void {
  const lines = [
    '# Written at every start; changes here are lost.',
    '[mariadbd]',
    `innodb-flush-log-at-trx-commit=${forTests ? 2 : 1}`,
    'innodb-doublewrite=1',
    `innodb-buffer-pool-size=${forTests ? 64 : 128}M`,
    `innodb-log-file-size=${forTests ? 16 : 96}M`,
    'sql-mode=STRICT_ALL_TABLES,STRICT_TRANS_TABLES,NO_ZERO_DATE,NO_ZERO_IN_DATE,ERROR_FOR_DIVISION_BY_ZERO,NO_ENGINE_SUBSTITUTION',
    'default-time-zone=+00:00',
    'character-set-server=utf8mb4',
    'collation-server=utf8mb4_unicode_520_ci',
    'skip-name-resolve',
    'bind-address=127.0.0.1',
    'local-infile=0',
    'max-allowed-packet=64M',
    `max-connections=${forTests ? 200 : 60}`,
    'performance-schema=OFF',
  ]
  writeFileSync(paths.config, `${lines.join('\n')}\n`, { mode: 0o600 })
}

export type LocalAccounts = Record<'migrate' | 'app' | 'redact', string>

/** The passwords of the three accounts: drawn once, kept in a file that only its owner reads. */
export function localAccounts(paths: LocalMariaDbPaths): LocalAccounts {
  if (existsSync(paths.accounts)) return JSON.parse(readFileSync(paths.accounts, 'utf8'))
  const password = () => randomBytes(24).toString('hex')
  const accounts: LocalAccounts = { migrate: password(), app: password(), redact: password() }
  writeFileSync(paths.accounts, `${JSON.stringify(accounts, null, 2)}\n`, { mode: 0o600 })
  return accounts
}

/**
 * What the server runs before it takes a connection: the database, its owner, and the two narrow
 * accounts, which db/grants.sql lets into the tables. Nobody ever signs in as root.
 */
export function writeFirstStatements(
  paths: LocalMariaDbPaths,
  accounts: LocalAccounts,
  forTests: boolean,
): void {
  const user = (name: string) => `'breathmark_${name}'@'127.0.0.1'`
  const statements = [
    'CREATE DATABASE IF NOT EXISTS `breathmark`;',
    ...Object.entries(accounts).flatMap(([name, password]) => [
      `CREATE USER IF NOT EXISTS ${user(name)};`,
      `ALTER USER ${user(name)} IDENTIFIED BY '${password}';`,
    ]),
    // Tests make a database for each of their files.
    `GRANT ALL PRIVILEGES ON \`breathmark${forTests ? '%' : ''}\`.* TO ${user('migrate')} WITH GRANT OPTION;`,
  ]
  writeFileSync(paths.firstStatements, `${statements.join('\n')}\n`, { mode: 0o600 })
}
