import { type DemoPerson, PEOPLE } from './people.ts'

const STYLE = `
:root { color-scheme: light; font: 16px/1.5 system-ui, sans-serif; color: #1f2a2e; background: #eef1f0 }
body { margin: 0 auto; max-width: 46rem; padding: 2rem 1rem 4rem }
main { background: #fff; border: 1px solid #cfd8d6; border-radius: 6px; padding: 1.5rem }
h1 { font-size: 1.4rem; margin: 0 0 .5rem } h2 { font-size: 1rem; margin: 1.25rem 0 .5rem }
p { margin: 0 0 1rem } .note { border-left: 4px solid #6b7f7a; padding-left: .75rem; color: #44534f }
.fault { border-left: 4px solid #a3262a; padding-left: .75rem }
ul { list-style: none; margin: 0; padding: 0; display: grid; gap: .5rem; grid-template-columns: repeat(auto-fill, minmax(15rem, 1fr)) }
button, input { font: inherit; min-height: 2.75rem; border-radius: 4px; border: 1px solid #6b7f7a; padding: .4rem .8rem; box-sizing: border-box }
button { background: #f6f8f7; color: inherit; cursor: pointer; text-align: left }
li button { width: 100%; height: 100% }
button:hover { background: #e4ebe8 } :focus-visible { outline: 3px solid #17594a; outline-offset: 2px }
.row { display: flex; flex-wrap: wrap; gap: .5rem; align-items: end } .row label { display: grid; flex: 1 1 14rem }
footer { margin-top: 1.5rem }
`

const NOTE =
  '<p class="note">Stand-in identity provider for demonstration and tests. Invented accounts.</p>'

/** Escapes text for HTML content and for attribute values in double quotes. */
export const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`)

function page(title: string, body: string): string {
  return `<!doctype html>
<html lang="en-GB">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)} – stand-in identity provider</title>
<style>${STYLE}</style>
</head>
<body><main><h1>${escapeHtml(title)}</h1>
${NOTE}
${body}</main></body>
</html>`
}

/**
 * Choosing an account signs in with it; there are no passwords to know.
 * @param options.again somebody already signed in is asked once more, for a signature
 */
export function signInPage(options: {
  action: string
  again: boolean
  current: DemoPerson | undefined
  fault?: string
}): string {
  const groups = [...new Set(PEOPLE.map((person) => person.group))]
  const again = options.again
    ? `<p>${
        options.current ? `Signed in here: ${escapeHtml(options.current.name)}. ` : ''
      }Sign in again to confirm that it is you.</p>`
    : '<p>Choose who you are.</p>'
  const fault = options.fault
    ? `<p class="fault" role="alert">${escapeHtml(options.fault)}</p>`
    : ''
  const lists = groups.map((group) => {
    const accounts = PEOPLE.filter((person) => person.group === group).map(accountButton)
    return `<h2>${escapeHtml(group)}</h2><ul>${accounts.join('')}</ul>`
  })
  const action = escapeHtml(options.action)
  return page(
    options.again ? 'Sign in again' : 'Sign in',
    `${again}${fault}
<form method="post" action="${action}">${lists.join('\n')}</form>
<h2>Or type a user name</h2>
<form method="post" action="${action}"><div class="row">
<label>User name<input name="account" autocomplete="username" autocapitalize="none" required></label>
<button>Sign in</button></div></form>
<footer><form method="post" action="${action}"><button name="cancel" value="yes">Cancel</button></form></footer>`,
  )
}

const accountButton = (person: DemoPerson): string =>
  `<li><button name="account" value="${escapeHtml(person.subject)}">${escapeHtml(person.name)}</button></li>`

/** @param form the provider's own form with its one-time value; the button belongs to it */
export const signOutPage = (form: string): string =>
  page(
    'Sign out',
    `<p>Sign out of the identity provider as well?</p>${form}
<button form="op.logoutForm" name="logout" value="yes" autofocus>Sign out</button>`,
  )

export const signedOutPage = (): string => page('Signed out', '<p>You are signed out.</p>')

export const faultPage = (sentence: string): string =>
  page('That did not work', `<p class="fault" role="alert">${escapeHtml(sentence)}</p>`)
