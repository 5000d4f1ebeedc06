import { readFileSync, writeFileSync } from 'node:fs'
import { ROUTES } from '#server/routes.ts'
import { ERROR_CODES } from '#shared/errors/codes.ts'
import { BLINDING } from '#shared/policy/informationClasses.ts'
import { ACTIONS, type Grant, policyRow } from '#shared/policy/permissions.ts'

/** Writes the pages of docs/reference from the code, or with `--check` fails when one is stale. */
const GENERATED = '<!-- Written by `npm run docs:reference`. Do not edit. -->'

const table = (headings: string[], rows: string[][]): string =>
  [headings, headings.map(() => '---'), ...rows]
    .map((cells) => `| ${cells.join(' | ')} |`)
    .join('\n')

const SCOPES: Record<Grant['scope'], string> = {
  ownSite: 'own site',
  study: 'whole study',
  self: 'what the person started',
  installation: 'outside any study',
}

const grantWords = (grant: Grant) =>
  [
    grant.duty ? `${grant.role} · ${grant.duty}` : grant.role,
    `(${SCOPES[grant.scope]}${grant.afterRelease ? ', after release' : ''})`,
  ].join(' ')

const permissions = `# Permissions
${GENERATED}

What each action needs, as \`shared/policy/permissions.ts\` says it. In a study of earlier data the duty
does not count, and the data count as released. Whatever lies in another study or at another site
answers as if it did not exist.

${table(
  ['Action', 'Who', 'Reveals', 'Under lock', 'Leaves in the trail'],
  ACTIONS.map((action) => {
    const row = policyRow(action)
    return [
      `\`${action}\``,
      row.grants.map(grantWords).join('<br>'),
      row.reveals,
      row.effect === 'write' ? (row.whenLocked ?? '') : 'allow',
      row.records ?? '',
    ]
  }),
)}

## Blinding
Who may read single values of a class in a prospective study, as \`shared/policy/informationClasses.ts\` says it.

${table(
  ['Duty or role', 'index', 'reference', 'linked'],
  Object.entries(BLINDING).map(([who, row]) => [who, row.index, row.reference, row.linked]),
)}
`

const errors = `# Errors
${GENERATED}

Every refusal answers \`{ code, message, fields?, more?, requestId }\` under one of these codes.

${table(
  ['Code', 'Status', 'Sentence'],
  Object.entries(ERROR_CODES).map(([code, [status, sentence]]) => [
    `\`${code}\``,
    String(status),
    sentence,
  ]),
)}
`

const routes = `# Routes
${GENERATED}

${table(
  ['Method', 'Address', 'Action'],
  ROUTES.map((route) => [
    route.method.toUpperCase(),
    `\`${route.path}\``,
    `\`${route.action}\``,
  ]).sort((a, b) => a[1]!.localeCompare(b[1]!)),
)}
`

const PAGES = { permissions, errors, routes }
const checking = process.argv.includes('--check')
for (const [name, text] of Object.entries(PAGES)) {
  const file = new URL(`./${name}.md`, import.meta.url)
  if (!checking) writeFileSync(file, text)
  else if (readFileSync(file, 'utf8') !== text) {
    console.error(`docs/reference/${name}.md is stale: run npm run docs:reference`)
    process.exitCode = 1
  }
}
