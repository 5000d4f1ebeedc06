import { existsSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { checkFolder } from './harness/checkFolder.ts'

/** `npm run check:references -- DIR`: compares the product with the reference values in DIR. */
const own = join(dirname(fileURLToPath(import.meta.url)), 'references')
const folder = resolve(process.argv[2] ?? own)

if (!existsSync(join(folder, 'data')) || !existsSync(join(folder, 'results'))) {
  console.error(`${folder} has no data/ and results/ in it.`)
  process.exit(2)
}

const { checked, failures, failed, notCovered } = checkFolder(folder)
for (const failure of failures) console.log(`FAILED ${failure}`)
for (const record of notCovered) console.log(`NOT COVERED ${record}`)
console.log(`${checked} checked, ${failed} failed, ${notCovered.length} not covered`)
process.exitCode = failed > 0 || notCovered.length > 0 ? 1 : 0
